package report

import (
	"archive/zip"
	"compress/flate"
	"fmt"
	"io"
	"strconv"
	"strings"
	"time"
)

// WriteDOCX writes the document as a word processor's file (Office Open XML):
// headings, paragraphs, lists, tables whose heads are repeated on every page,
// and drawings as pictures. Sections with a wide table lie across the page, those
// with a large drawing have an A3 page to themselves; the foot of every page has
// the document number and the page number.
//
// Each drawing goes in as SVG, which word processors of 2016 and later show, with
// a copy for the others: a PNG where picture gives one, else a metafile with the
// same strokes and text, else a plate with a sentence that says what is missing.
// picture may be nil.
//
// The file carries no date and no author: the same document gives the same bytes.
// All text is text, whatever it holds; what XML does not allow is replaced.
func (d *Document) WriteDOCX(w io.Writer, u Units, picture func(Figure) ([]byte, error)) error {
	x := &docx{units: u, picture: picture}
	if err := x.document(d); err != nil {
		return err
	}
	z := zip.NewWriter(w)
	// One fast compressor serves all parts, which are written one after the other.
	squeeze, err := flate.NewWriter(io.Discard, flate.BestSpeed)
	if err != nil {
		return err
	}
	z.RegisterCompressor(zip.Deflate, func(w io.Writer) (io.WriteCloser, error) {
		squeeze.Reset(w)
		return squeeze, nil
	})
	parts := append([]docxPart{
		{"[Content_Types].xml", []byte(docxTypes)},
		{"_rels/.rels", []byte(docxRels)},
		{"docProps/core.xml", []byte(fmt.Sprintf(docxCore, xmlText(d.Title), epoch, epoch))},
		{"word/document.xml", []byte(docxHead + x.body.String() + docxEnd)},
		{"word/styles.xml", []byte(docxStyles)},
		{"word/numbering.xml", []byte(docxNumbering)},
		{"word/settings.xml", []byte(docxSettings)},
		{"word/_rels/document.xml.rels", []byte(x.relations())},
	}, x.feet(d.Running)...)
	for _, p := range append(parts, x.media...) {
		method := zip.Deflate
		if strings.HasSuffix(p.name, ".png") {
			method = zip.Store // is compressed already
		}
		f, err := z.CreateHeader(&zip.FileHeader{Name: p.name, Method: method, Modified: docxTime})
		if err != nil {
			return err
		}
		if _, err := f.Write(p.data); err != nil {
			return err
		}
	}
	return z.Close()
}

// docxTime stands in for the time that the archive wants.
var docxTime = time.Date(2000, 1, 1, 0, 0, 0, 0, time.UTC)

// A docxPart is a file in the archive.
type docxPart struct {
	name string
	data []byte
}

// A docx is a word processor's file in the making.
type docx struct {
	units   Units
	picture func(Figure) ([]byte, error)
	body    strings.Builder
	media   []docxPart
	figures int
}

// A docxPaper is the page of a section, in twentieths of a point: 1 mm is
// 56.6929 of them.
type docxPaper struct {
	name                       string
	wide, high                 int
	left, right, top, bottom   int
	footer                     int
	across                     bool
	pictureWidth, pictureSpace float64 // mm that a drawing may take
}

// The papers, by the class of a section.
var docxPapers = map[string]docxPaper{
	"":       {"portrait", 11906, 16838, 1134, 1134, 1134, 1134, 567, false, 170, 230},
	"across": {"across", 16838, 11906, 1021, 1021, 1021, 1021, 510, true, 261, 150},
	"sheet":  {"sheet", 23811, 16838, 567, 567, 454, 680, 340, true, 400, 262},
}

// textWidth is the width between the margins.
func (p docxPaper) textWidth() int { return p.wide - p.left - p.right }

// section returns the properties that end a section on the paper.
func (p docxPaper) section() string {
	orient := ""
	if p.across {
		orient = ` w:orient="landscape"`
	}
	return fmt.Sprintf(`<w:sectPr><w:footerReference w:type="default" r:id="foot-%s"/><w:type w:val="nextPage"/><w:pgSz w:w="%d" w:h="%d"%s/><w:pgMar w:top="%d" w:right="%d" w:bottom="%d" w:left="%d" w:header="340" w:footer="%d" w:gutter="0"/></w:sectPr>`,
		p.name, p.wide, p.high, orient, p.top, p.right, p.bottom, p.left, p.footer)
}

// classOf chooses the paper of a section, as for the page in HTML.
func classOf(s Section) string {
	class := ""
	for _, b := range s.Blocks {
		switch b := b.(type) {
		case Figure:
			if b.Large {
				return "sheet"
			}
		case *Table:
			if len(b.Columns) >= wideFrom {
				class = "across"
			}
		}
	}
	return class
}

// document writes the title page and every section. Sections on the same paper
// follow each other; a large drawing always begins a page.
func (x *docx) document(d *Document) error {
	x.paragraph("Title", d.Title)
	x.paragraph("Subtitle", d.Subtitle)
	paper := docxPapers[""]
	x.fields(d.Fields, paper)
	for i, s := range d.Sections {
		class := classOf(s)
		if next := docxPapers[class]; next.name != paper.name || class == "sheet" {
			x.body.WriteString(`<w:p><w:pPr><w:pStyle w:val="SectionEnd"/>` + paper.section() + `</w:pPr></w:p>`)
			paper = next
		}
		x.heading(i+1, s)
		for _, b := range s.Blocks {
			if err := x.block(b, s, paper); err != nil {
				return err
			}
		}
	}
	x.body.WriteString(paper.section())
	return nil
}

// heading writes a numbered heading with a bookmark that links can reach.
func (x *docx) heading(number int, s Section) {
	name := "s_" + strings.Map(func(r rune) rune {
		if r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z' || r >= '0' && r <= '9' {
			return r
		}
		return '_'
	}, s.ID)
	if len(name) > 40 {
		name = name[:40]
	}
	fmt.Fprintf(&x.body, `<w:p><w:pPr><w:pStyle w:val="Heading1"/></w:pPr><w:bookmarkStart w:id="%d" w:name="%s"/>%s<w:bookmarkEnd w:id="%d"/></w:p>`,
		number, name, docxRun(strconv.Itoa(number)+"  "+s.Title), number)
}

func (x *docx) block(b Block, s Section, paper docxPaper) error {
	switch b := b.(type) {
	case Paragraph:
		x.paragraph("", string(b))
	case List:
		for _, item := range b {
			x.paragraph("ListBullet", item)
		}
	case *Table:
		x.table(b, paper)
	case Figure:
		return x.figure(b, s, paper)
	default:
		panic("report: unknown block")
	}
	return nil
}

// paragraph writes text in a style; nothing where there is no text.
func (x *docx) paragraph(style, text string) {
	if text == "" {
		return
	}
	x.body.WriteString(`<w:p>`)
	if style != "" {
		x.body.WriteString(`<w:pPr><w:pStyle w:val="` + style + `"/></w:pPr>`)
	}
	x.body.WriteString(docxRun(text) + `</w:p>`)
}

// relations names the parts that the text refers to.
func (x *docx) relations() string {
	const kind = "http://schemas.openxmlformats.org/officeDocument/2006/relationships/"
	var b strings.Builder
	b.WriteString(xmlHead + `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">`)
	add := func(id, what, target string) {
		fmt.Fprintf(&b, `<Relationship Id="%s" Type="%s%s" Target="%s"/>`, id, kind, what, target)
	}
	add("styles", "styles", "styles.xml")
	add("numbering", "numbering", "numbering.xml")
	add("settings", "settings", "settings.xml")
	for _, class := range docxClasses {
		name := docxPapers[class].name
		add("foot-"+name, "footer", "footer-"+name+".xml")
	}
	for _, m := range x.media {
		file := strings.TrimPrefix(m.name, "word/")
		id := strings.NewReplacer("media/", "", ".", "-").Replace(file)
		add(id, "image", file)
	}
	b.WriteString(`</Relationships>`)
	return b.String()
}

// docxClasses are the classes of sections in a fixed order.
var docxClasses = []string{"", "across", "sheet"}

// feet returns the foot of the page for every paper: the running text on the
// left, the page number on the right.
func (x *docx) feet(running string) []docxPart {
	var out []docxPart
	for _, class := range docxClasses {
		p := docxPapers[class]
		field := func(code string) string {
			return `<w:fldSimple w:instr=" ` + code + ` "><w:r><w:t>1</w:t></w:r></w:fldSimple>`
		}
		text := xmlHead + `<w:ftr ` + docxSpaces + `><w:p><w:pPr><w:pStyle w:val="Footer"/><w:tabs><w:tab w:val="right" w:pos="` + strconv.Itoa(p.textWidth()) + `"/></w:tabs></w:pPr>` +
			docxRun(running) + `<w:r><w:tab/></w:r>` + docxRun("Page ") + field("PAGE") + docxRun(" of ") + field("NUMPAGES") + `</w:p></w:ftr>`
		out = append(out, docxPart{"word/footer-" + p.name + ".xml", []byte(text)})
	}
	return out
}
