package report

import (
	"bytes"
	"crypto/sha256"
	_ "embed"
	"encoding/base64"
	"html/template"
	"io"
	"strconv"
)

//go:embed report.css
var styleSheet string

//go:embed report.html
var pageText string

var page = template.Must(template.New("report").Parse(pageText))

// htmlPage is what the template sees.
type htmlPage struct {
	*Document
	Policy   string
	Style    template.CSS
	Sections []htmlSection
}

// htmlSection has a Class that chooses its paper: a section with a wide table
// lies across the page, one of drawings has pages of
// their size to itself.
type htmlSection struct {
	ID, Number, Title, Class string
	Blocks                   []htmlBlock
}

// htmlBlock has one of its fields set.
type htmlBlock struct {
	Paragraph string
	List      []string
	Table     *htmlTable
	Figure    *htmlFigure
}

type htmlTable struct {
	Title, Note string
	Wide        bool
	Heads       []htmlCell
	Rows        [][]htmlCell
}

type htmlCell struct {
	Text    string
	Numeric bool
}

type htmlFigure struct {
	Figure
	Drawing template.HTML
}

// wideFrom is the number of columns from which a table is printed across the page.
const wideFrom = 10

// WriteHTML writes the document as one page that needs nothing else: no script,
// no font, no picture from outside. Its content policy allows its own style
// sheet, by hash, and nothing more. Drawings are inlined as they are: they must
// come from the drawing packages, which escape all text.
func (d *Document) WriteHTML(w io.Writer, u Units) error {
	sum := sha256.Sum256([]byte(styleSheet + runningFoot(d.Running)))
	p := htmlPage{
		Document: d,
		Policy:   "default-src 'none'; style-src 'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'; img-src data:; base-uri 'none'; form-action 'none'",
		Style:    template.CSS(styleSheet + runningFoot(d.Running)),
	}
	for i, s := range d.Sections {
		h := htmlSection{ID: s.ID, Number: strconv.Itoa(i + 1), Title: s.Title}
		for _, b := range s.Blocks {
			hb := htmlOf(b, u)
			switch {
			case hb.Figure != nil && hb.Figure.Large:
				h.Class = "sheet"
			case hb.Figure != nil:
				h.Class = "leaf"
			case hb.Table != nil && hb.Table.Wide && h.Class == "":
				h.Class = "across"
			}
			h.Blocks = append(h.Blocks, hb)
		}
		p.Sections = append(p.Sections, h)
	}
	// Text is made harmless once, at the end: no direction mark or control
	// character reaches the page, wherever it came from.
	var b bytes.Buffer
	if err := page.Execute(&b, p); err != nil {
		return err
	}
	_, err := io.WriteString(w, visible(b.String()))
	return err
}

func htmlOf(b Block, u Units) htmlBlock {
	switch b := b.(type) {
	case Paragraph:
		return htmlBlock{Paragraph: string(b)}
	case List:
		return htmlBlock{List: b}
	case *Table:
		return htmlBlock{Table: htmlTableOf(b, u)}
	case Figure:
		return htmlBlock{Figure: &htmlFigure{b, template.HTML(inline(b.SVG))}}
	}
	panic("report: unknown block")
}

func htmlTableOf(t *Table, u Units) *htmlTable {
	h := &htmlTable{Title: t.Title, Note: t.Note, Wide: len(t.Columns) >= wideFrom}
	for _, c := range t.Columns {
		h.Heads = append(h.Heads, htmlCell{c.Heading(u), c.numeric()})
	}
	for _, r := range t.Rows {
		row := make([]htmlCell, len(r))
		for i, c := range r {
			row[i] = htmlCell{t.Columns[i].Format(c, u), t.Columns[i].numeric()}
		}
		h.Rows = append(h.Rows, row)
	}
	return h
}
