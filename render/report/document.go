package report

// A Document is a report before it is written in any format.
type Document struct {
	Title    string
	Subtitle string
	Running  string // document number and revision, for the foot of every page
	Fields   []Field
	Sections []Section
}

// A Field is a line of the title block; an empty value is left to be filled in
// by hand.
type Field struct{ Name, Value string }

// A Section is a numbered part of a document.
type Section struct {
	ID     string // for links; letters and dashes
	Title  string
	Blocks []Block
}

// A Block is a Paragraph, a List, a *Table or a Figure.
type Block interface{ block() }

// A Paragraph is a run of plain text.
type Paragraph string

// A List is a list of remarks.
type List []string

// A Figure is a drawing with its caption.
type Figure struct {
	ID      string // letters, digits and dashes, unique in the document
	Caption string
	SVG     []byte
	Large   bool // drawn for A3
}

func (Paragraph) block() {}
func (List) block()      {}
func (*Table) block()    {}
func (Figure) block()    {}

// Only returns the table with the columns of these keys, in the order given.
// A key that the table does not have is our own mistake and panics.
func (t *Table) Only(keys ...string) *Table {
	at := make([]int, len(keys))
	out := &Table{Name: t.Name, Title: t.Title, Note: t.Note}
	for i, k := range keys {
		at[i] = -1
		for j, c := range t.Columns {
			if c.Key == k {
				at[i] = j
				out.Columns = append(out.Columns, c)
			}
		}
		if at[i] < 0 {
			panic("report: table " + t.Name + " has no column " + k)
		}
	}
	for _, r := range t.Rows {
		row := make([]Cell, len(at))
		for i, j := range at {
			row[i] = r[j]
		}
		out.Rows = append(out.Rows, row)
	}
	return out
}

// Without returns the table without the column of a key.
func (t *Table) Without(key string) *Table {
	var keys []string
	for _, c := range t.Columns {
		if c.Key != key {
			keys = append(keys, c.Key)
		}
	}
	return t.Only(keys...)
}

// Named returns the table under another caption.
func (t *Table) Named(title string) *Table {
	out := *t
	out.Title = title
	return &out
}
