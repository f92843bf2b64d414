package report

import (
	"encoding/xml"
	"fmt"
	"math"
	"strings"
	"unicode/utf8"
)

// xmlText escapes text for XML. Characters that XML does not allow, and marks
// that turn the direction of a line, are replaced.
func xmlText(s string) string {
	var b strings.Builder
	// EscapeText replaces what is no character; it only fails where the writer does.
	_ = xml.EscapeText(&b, []byte(visible(s)))
	return b.String()
}

// lineEnds makes one kind of line end of all.
var lineEnds = strings.NewReplacer("\r\n", "\n", "\r", "\n")

// docxRun returns text as a run, line breaks and tabs as such.
func docxRun(s string) string {
	if s == "" {
		return ""
	}
	var b strings.Builder
	b.WriteString(`<w:r>`)
	for i, line := range strings.Split(lineEnds.Replace(s), "\n") {
		if i > 0 {
			b.WriteString(`<w:br/>`)
		}
		for j, part := range strings.Split(line, "\t") {
			if j > 0 {
				b.WriteString(`<w:tab/>`)
			}
			if part != "" {
				b.WriteString(`<w:t xml:space="preserve">` + xmlText(part) + `</w:t>`)
			}
		}
	}
	b.WriteString(`</w:r>`)
	return b.String()
}

// fields writes the title block.
func (x *docx) fields(fields []Field, paper docxPaper) {
	if len(fields) == 0 {
		return
	}
	widths := []int{paper.textWidth() / 4, paper.textWidth() - paper.textWidth()/4}
	x.open(widths)
	for _, f := range fields {
		x.body.WriteString(`<w:tr><w:trPr><w:cantSplit/></w:trPr>`)
		x.cell(widths[0], "TableHead", f.Name)
		x.cell(widths[1], "TableText", f.Value)
		x.body.WriteString(`</w:tr>`)
	}
	x.close()
}

// table writes a table with its caption above it and its note below.
func (x *docx) table(t *Table, paper docxPaper) {
	if len(t.Columns) == 0 {
		return
	}
	text, number, head := "TableText", "TableNumber", "TableHead"
	if len(t.Columns) >= wideFrom {
		text, number, head = "TableTextSmall", "TableNumberSmall", "TableHeadSmall"
	}
	x.paragraph("Caption", t.Title)
	widths := x.widths(t, paper.textWidth())
	x.open(widths)
	heads := ""
	for _, c := range t.Columns {
		heads += c.Heading(x.units)
	}
	if heads != "" { // a table of properties has no headings
		x.body.WriteString(`<w:tr><w:trPr><w:cantSplit/><w:tblHeader/></w:trPr>`)
		for i, c := range t.Columns {
			style := head
			if c.numeric() {
				style += "Number"
			}
			x.cell(widths[i], style, c.Heading(x.units))
		}
		x.body.WriteString(`</w:tr>`)
	}
	for _, r := range t.Rows {
		x.body.WriteString(`<w:tr><w:trPr><w:cantSplit/></w:trPr>`)
		for i, c := range t.Columns {
			style := text
			if c.numeric() {
				style = number
			}
			x.cell(widths[i], style, c.Format(r[i], x.units))
		}
		x.body.WriteString(`</w:tr>`)
	}
	x.close()
	x.paragraph("Note", t.Note)
}

func (x *docx) open(widths []int) {
	total := 0
	for _, w := range widths {
		total += w
	}
	fmt.Fprintf(&x.body, `<w:tbl><w:tblPr><w:tblStyle w:val="Ruled"/><w:tblW w:w="%d" w:type="dxa"/><w:tblLayout w:type="fixed"/><w:tblLook w:val="0020" w:firstRow="1"/></w:tblPr><w:tblGrid>`, total)
	for _, w := range widths {
		fmt.Fprintf(&x.body, `<w:gridCol w:w="%d"/>`, w)
	}
	x.body.WriteString(`</w:tblGrid>`)
}

// close ends a table. Two tables that touch would become one.
func (x *docx) close() {
	x.body.WriteString(`</w:tbl><w:p><w:pPr><w:pStyle w:val="AfterTable"/></w:pPr></w:p>`)
}

func (x *docx) cell(width int, style, text string) {
	fmt.Fprintf(&x.body, `<w:tc><w:tcPr><w:tcW w:w="%d" w:type="dxa"/></w:tcPr><w:p><w:pPr><w:pStyle w:val="%s"/></w:pPr>%s</w:p></w:tc>`, width, style, docxRun(text))
}

// How much of a text asks for width, in characters: a longer word is broken, a
// longer text is wrapped.
const (
	longestWord = 16
	longestText = 70
	cellMargins = 1.8 // the room of the margins of a cell, in characters
	tallest     = 1.7 // of the square root of a text: keeps long remarks from tall, narrow cells
)

// widths shares the width of a page among the columns of a table: to each what
// its longest word or number needs, the rest to those whose text must wrap.
func (x *docx) widths(t *Table, total int) []int {
	least, most := make([]float64, len(t.Columns)), make([]float64, len(t.Columns))
	need := func(i int, s string, numeric bool) {
		all := float64(min(utf8.RuneCountInString(s), longestText))
		word := 0
		for _, w := range strings.Fields(s) {
			word = max(word, utf8.RuneCountInString(w))
		}
		if !numeric {
			word = min(word, longestWord)
		}
		least[i], most[i] = math.Max(least[i], float64(word)), math.Max(most[i], all)
		if !numeric {
			least[i] = math.Max(least[i], math.Min(tallest*math.Sqrt(float64(utf8.RuneCountInString(s))), 2*longestWord))
		}
	}
	for i, c := range t.Columns {
		need(i, c.Heading(x.units), true)
		for _, r := range t.Rows {
			need(i, c.Format(r[i], x.units), c.numeric())
		}
		if c.numeric() {
			most[i] = least[i] // a heading over numbers may wrap
		}
	}
	var sum, spare float64
	for i := range least {
		least[i] += cellMargins
		most[i] = math.Max(most[i]+cellMargins, least[i])
		sum += least[i]
		spare += most[i] - least[i]
	}
	// A page holds about a character for each 90 twentieths of a point of small
	// print; what is over is shared by need, or by least width where none needs it.
	room := math.Max(0, float64(total)/90-sum)
	widths, used := make([]int, len(least)), 0
	scale := 0.0
	share := make([]float64, len(least))
	for i := range least {
		share[i] = least[i]
		if spare > 0 {
			share[i] += math.Min(room, spare) * (most[i] - least[i]) / spare
		}
		scale += share[i]
	}
	for i := range widths {
		widths[i] = int(float64(total) * share[i] / scale)
		used += widths[i]
	}
	widths[len(widths)-1] += total - used
	return widths
}
