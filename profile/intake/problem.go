package intake

import (
	"fmt"
	"sort"
	"strconv"
	"strings"
)

// A Problem is one thing in the input that cannot be right, or cannot be
// understood.
type Problem struct {
	File    string // as it was named to the program, without its folder
	Line    int    // 0 where the problem is the file's as a whole
	Column  int    // 1 is the first field, and stands for the row as a whole too
	Name    string // the quantity, table or setting
	Message string // what was found
	Wanted  string // what is wanted instead
}

// String returns file:line:column: name: message; want wanted.
func (p Problem) String() string {
	var b strings.Builder
	b.WriteString(p.File)
	if p.Line > 0 {
		b.WriteString(":" + strconv.Itoa(p.Line) + ":" + strconv.Itoa(max(p.Column, 1)))
	}
	if p.Name != "" {
		b.WriteString(": " + p.Name)
	}
	b.WriteString(": " + p.Message)
	if p.Wanted != "" {
		b.WriteString("; want " + p.Wanted)
	}
	return b.String()
}

// Problems are all problems of one Read, by file, line and column.
type Problems []Problem

// maxPrinted is how many problems are worth reading at once.
const maxPrinted = 200

// Error returns one line per problem, at most 200 and then how many more.
func (p Problems) Error() string {
	var b strings.Builder
	for i, one := range p {
		if i == maxPrinted {
			fmt.Fprintf(&b, "\n… and %d more", len(p)-maxPrinted)
			break
		}
		if i > 0 {
			b.WriteByte('\n')
		}
		b.WriteString(one.String())
	}
	return b.String()
}

// sorted returns the problems in their total order without repetitions: the
// same cell can fail the same check only once.
func (p Problems) sorted() Problems {
	sort.SliceStable(p, func(i, j int) bool {
		a, b := p[i], p[j]
		switch {
		case a.File != b.File:
			return a.File < b.File
		case a.Line != b.Line:
			return a.Line < b.Line
		case a.Column != b.Column:
			return a.Column < b.Column
		case a.Name != b.Name:
			return a.Name < b.Name
		default:
			return a.Message < b.Message
		}
	})
	out := p[:0]
	for i, one := range p {
		if i == 0 || one != p[i-1] {
			out = append(out, one)
		}
	}
	return out
}
