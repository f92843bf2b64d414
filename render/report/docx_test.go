package report

import (
	"archive/zip"
	"bytes"
	"encoding/xml"
	"errors"
	"image/png"
	"io"
	"path"
	"strings"
	"testing"
)

// strangeTexts are texts that a table from elsewhere may hold.
var strangeTexts = []string{
	`<w:p>&amp;"'</w:t>`, "]]>", "=HYPERLINK(\"http://x\")", "\u202eabc\u2066", "\x00\x07\x1b[31m", "a\nb\tc\r\nd", "\uFFFE\uFFFF\xff\xed\xa0\x80",
	strings.Repeat("long", 2500), "שלום", "𝔘𝔫𝔦", "{ PAGE }", "",
}

const tinySVG = `<svg xmlns="http://www.w3.org/2000/svg" width="420mm" height="297mm"><title>t</title><desc>OCR falls &amp; rises</desc><rect width="9" height="9"/></svg>`

// everyBlock has every kind of block, each with strangeTexts text.
func everyBlock() *Document {
	table := &Table{Name: "t", Title: "Table", Note: "note", Columns: []Column{{"words", "words", Words, 0}, {"depth", "depth", Length, 2}}}
	wide := &Table{Name: "w", Title: "Wide"}
	for range wideFrom {
		wide.Columns = append(wide.Columns, Column{"c", "c", Pure, 1})
	}
	d := &Document{Title: "Report", Subtitle: "Site", Running: "N-1", Fields: []Field{{"Project", "P"}, {"Client", ""}}}
	list := List{}
	for _, h := range strangeTexts {
		table.Add(T(h), N(-1.5))
		list = append(list, h)
		d.Fields = append(d.Fields, Field{h, h})
	}
	wide.Add(make([]Cell, wideFrom)...)
	d.Sections = []Section{
		{"a", "First", []Block{Paragraph(strings.Join(strangeTexts, " ")), list, table}},
		{"b", "Wide", []Block{wide}},
		{"c", "Drawing", []Block{Figure{ID: "f", Caption: "Drawing", SVG: []byte(tinySVG), Large: true}}},
		{"d", strangeTexts[0], []Block{Figure{ID: "g", Caption: strangeTexts[0] + " 2", SVG: []byte("<svg"), Large: false}}},
	}
	return d
}

// unpacked writes a document and returns its parts.
func unpacked(t testing.TB, d *Document, picture func(Figure) ([]byte, error)) map[string][]byte {
	t.Helper()
	var b bytes.Buffer
	if err := d.WriteDOCX(&b, SI, picture); err != nil {
		t.Fatal(err)
	}
	z, err := zip.NewReader(bytes.NewReader(b.Bytes()), int64(b.Len()))
	if err != nil {
		t.Fatal(err)
	}
	parts := map[string][]byte{}
	for _, f := range z.File {
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		data, err := io.ReadAll(r)
		if err != nil {
			t.Fatal(err)
		}
		if _, twice := parts[f.Name]; twice {
			t.Errorf("%s is in the archive twice", f.Name)
		}
		parts[f.Name] = data
	}
	return parts
}

// elements counts the elements of a part and returns its text, so that a part
// that is no XML fails.
func elements(t testing.TB, name string, data []byte) (count map[string]int, text string) {
	t.Helper()
	count = map[string]int{}
	var words strings.Builder
	d := xml.NewDecoder(bytes.NewReader(data))
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			return count, words.String()
		}
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		switch token := token.(type) {
		case xml.StartElement:
			count[token.Name.Local]++
		case xml.CharData:
			words.Write(token)
		}
	}
}

func TestDOCXIsWellFormedAndWhole(t *testing.T) {
	parts := unpacked(t, everyBlock(), nil)
	for name, data := range parts {
		if strings.HasSuffix(name, ".xml") || strings.HasSuffix(name, ".rels") {
			elements(t, name, data)
		}
	}
	count, _ := elements(t, "document", parts["word/document.xml"])
	for name, want := range map[string]int{"tbl": 3, "drawing": 2, "sectPr": 4, "tblHeader": 2, "blip": 2, "svgBlip": 2} {
		if count[name] != want {
			t.Errorf("%d %s, want %d", count[name], name, want)
		}
	}
	// Every part that is referred to is there, and is of a type that is named.
	rels := string(parts["word/_rels/document.xml.rels"])
	for _, piece := range strings.Split(rels, `Target="`)[1:] {
		target, _, _ := strings.Cut(piece, `"`)
		if parts[path.Join("word", target)] == nil {
			t.Errorf("no part %s", target)
		}
	}
	document := string(parts["word/document.xml"])
	for _, marker := range []string{`r:embed="`, `r:id="`} {
		for _, piece := range strings.Split(document, marker)[1:] {
			id, _, _ := strings.Cut(piece, `"`)
			if !strings.Contains(rels, `Id="`+id+`"`) {
				t.Errorf("no relation %s", id)
			}
		}
	}
	styles := string(parts["word/styles.xml"])
	for _, marker := range []string{`<w:pStyle w:val="`, `<w:tblStyle w:val="`} {
		for _, piece := range strings.Split(document, marker)[1:] {
			id, _, _ := strings.Cut(piece, `"`)
			if !strings.Contains(styles, `w:styleId="`+id+`"`) {
				t.Errorf("no style %s", id)
			}
		}
	}
}

func TestDOCXKeepsHostileTextAsText(t *testing.T) {
	document := unpacked(t, everyBlock(), nil)["word/document.xml"]
	_, text := elements(t, "document", document)
	for _, want := range []string{`<w:p>&amp;"'</w:t>`, "]]>", "=HYPERLINK", "{ PAGE }", "שלום", "𝔘𝔫𝔦", strangeTexts[7]} {
		if !strings.Contains(text, want) {
			t.Errorf("no %.20q in the text", want)
		}
	}
	if strings.ContainsAny(string(document), "\u202e\u2066\x00\x07\x1b\uFFFE\uFFFF") {
		t.Error("characters that XML does not allow, or that turn a line, are in the text")
	}
	if bytes.Contains(document, []byte("instrText")) || bytes.Contains(document, []byte("fldSimple")) {
		t.Error("text of a table has become a field")
	}
}

func TestDOCXPagesAreAsLargeAsTheirContentNeeds(t *testing.T) {
	document := string(unpacked(t, everyBlock(), nil)["word/document.xml"])
	var sizes []string
	for _, piece := range strings.Split(document, "<w:pgSz ")[1:] {
		size, _, _ := strings.Cut(piece, "/>")
		sizes = append(sizes, size)
	}
	want := []string{`w:w="11906" w:h="16838"`, `w:w="16838" w:h="11906" w:orient="landscape"`, `w:w="23811" w:h="16838" w:orient="landscape"`, `w:w="11906" w:h="16838"`}
	if strings.Join(sizes, "|") != strings.Join(want, "|") {
		t.Errorf("pages %q, want %q", sizes, want)
	}
	// 420 × 297 mm is drawn as large as 400 × 262 mm allow: 262/297 of it.
	if !strings.Contains(document, `<wp:extent cx="13338181" cy="9432000"/>`) {
		t.Errorf("the A3 drawing has another size: %s", document[strings.Index(document, "<wp:extent"):][:60])
	}
	if !strings.Contains(document, `descr="Drawing. OCR falls &amp; rises"`) {
		t.Error("the drawing has no description")
	}
}

func TestDOCXPictures(t *testing.T) {
	given := []byte("\x89PNG given")
	parts := unpacked(t, everyBlock(), func(f Figure) ([]byte, error) {
		if f.ID == "f" {
			return given, nil
		}
		return nil, nil
	})
	if !bytes.Equal(parts["word/media/picture1.png"], given) || !bytes.Equal(parts["word/media/picture1.svg"], []byte(tinySVG)) {
		t.Error("the given picture or its drawing is not in the file")
	}
	plate, err := png.Decode(bytes.NewReader(parts["word/media/picture2.png"]))
	if err != nil {
		t.Fatal(err)
	}
	if b := plate.Bounds(); b.Dx() != 340 || b.Dy() != 240 {
		t.Errorf("the plate is %v; want 340 by 240 for a drawing that does not tell its size", b)
	}
	if parts := unpacked(t, everyBlock(), nil); parts["word/media/picture1.emf"] == nil {
		t.Error("a drawing of ours has no copy as a metafile")
	}
	broken := errors.New("no ink")
	err = everyBlock().WriteDOCX(io.Discard, SI, func(Figure) ([]byte, error) { return nil, broken })
	if !errors.Is(err, broken) || !strings.Contains(err.Error(), "picture of f") {
		t.Errorf("error %v", err)
	}
}

func TestDOCXIsTheSameEveryTime(t *testing.T) {
	var a, b bytes.Buffer
	if err := everyBlock().WriteDOCX(&a, US, nil); err != nil {
		t.Fatal(err)
	}
	if err := everyBlock().WriteDOCX(&b, US, nil); err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(a.Bytes(), b.Bytes()) {
		t.Error("two files of one document differ")
	}
}

func TestDOCXOfAnEmptyDocument(t *testing.T) {
	parts := unpacked(t, &Document{}, nil)
	if count, _ := elements(t, "document", parts["word/document.xml"]); count["sectPr"] != 1 {
		t.Errorf("%d sections, want 1", count["sectPr"])
	}
}

func TestDOCXOfTheDemo(t *testing.T) {
	p := demo(t)
	parts := unpacked(t, Compose(Content{Profile: p}), nil)
	_, text := elements(t, "document", parts["word/document.xml"])
	for _, want := range []string{"Lorrick Level flood bank raising", "BH1-P3", "results.csv:6:2"} {
		if !strings.Contains(text, want) {
			t.Errorf("no %q in the document", want)
		}
	}
}

func TestWidthsFillThePage(t *testing.T) {
	x := &docx{}
	for _, table := range []*Table{everyBlock().Sections[0].Blocks[2].(*Table), everyBlock().Sections[1].Blocks[0].(*Table)} {
		total := 0
		for _, w := range x.widths(table, 9638) {
			if w <= 0 {
				t.Errorf("%s: a column of %d", table.Name, w)
			}
			total += w
		}
		if total != 9638 {
			t.Errorf("%s: widths add up to %d", table.Name, total)
		}
	}
}

func FuzzDOCXText(f *testing.F) {
	for _, h := range strangeTexts {
		f.Add(h)
	}
	f.Fuzz(func(t *testing.T, s string) {
		elements(t, "run", []byte(`<r xmlns:w="w">`+docxRun(s)+`</r>`))
	})
}

func BenchmarkWriteDOCX(b *testing.B) {
	d := Compose(Content{Profile: demo(b)})
	for b.Loop() {
		if err := d.WriteDOCX(io.Discard, SI, nil); err != nil {
			b.Fatal(err)
		}
	}
}
