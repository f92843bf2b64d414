package report

import (
	"fmt"
	"io"
	"strings"

	"github.com/xuri/excelize/v2"
)

// maxCellText is the longest text that a workbook cell holds, in characters.
const maxCellText = 32767

// WriteXLSX writes tables as a workbook, one sheet each: a bold heading row that
// stays in view, numbers as numbers shown with the table's decimals, text always
// as text, so that no cell of a laboratory's file becomes a formula. The file
// carries no date and no author: the same tables give the same bytes.
func WriteXLSX(w io.Writer, u Units, tables ...*Table) error {
	f := excelize.NewFile()
	defer f.Close()
	if err := f.SetDocProps(&excelize.DocProperties{Created: epoch, Modified: epoch, Creator: "pastload", LastModifiedBy: "pastload"}); err != nil {
		return err
	}
	names := sheetNames(tables)
	for i, t := range tables {
		if i == 0 {
			if err := f.SetSheetName(f.GetSheetName(0), names[i]); err != nil {
				return err
			}
		} else if _, err := f.NewSheet(names[i]); err != nil {
			return err
		}
		if err := writeSheet(f, names[i], t, u); err != nil {
			return fmt.Errorf("sheet %s: %w", names[i], err)
		}
	}
	return f.Write(w)
}

// epoch stands in for the dates that the format wants: output does not depend
// on the clock.
const epoch = "2000-01-01T00:00:00Z"

func writeSheet(f *excelize.File, name string, t *Table, u Units) error {
	head, err := f.NewStyle(&excelize.Style{Font: &excelize.Font{Bold: true}, Border: []excelize.Border{{Type: "bottom", Style: 1, Color: "000000"}}, Alignment: &excelize.Alignment{WrapText: true, Vertical: "top"}})
	if err != nil {
		return err
	}
	for i, c := range t.Columns {
		column, err := excelize.ColumnNumberToName(i + 1)
		if err != nil {
			return err
		}
		if err := f.SetCellStr(name, column+"1", c.Heading(u)); err != nil {
			return err
		}
		if err := styleColumn(f, name, column, c, u); err != nil {
			return err
		}
	}
	if len(t.Columns) > 0 {
		last, _ := excelize.CoordinatesToCellName(len(t.Columns), 1)
		if err := f.SetCellStyle(name, "A1", last, head); err != nil {
			return err
		}
	}
	for r, row := range t.Rows {
		for i, cell := range row {
			at, err := excelize.CoordinatesToCellName(i+1, r+2)
			if err != nil {
				return err
			}
			if err := writeCell(f, name, at, t.Columns[i], cell, u); err != nil {
				return err
			}
		}
	}
	return f.SetPanes(name, &excelize.Panes{Freeze: true, YSplit: 1, TopLeftCell: "A2", ActivePane: "bottomLeft"})
}

// styleColumn sets the width and the number format of a column.
func styleColumn(f *excelize.File, name, column string, c Column, u Units) error {
	width := 11.0
	if !c.numeric() {
		width = 22
	}
	if err := f.SetColWidth(name, column, column, width); err != nil {
		return err
	}
	if !c.numeric() {
		return nil
	}
	format := "0"
	if d := c.Decimals + u.of(c.Dimension).decimals; d > 0 {
		format += "." + strings.Repeat("0", d)
	}
	style, err := f.NewStyle(&excelize.Style{CustomNumFmt: &format})
	if err != nil {
		return err
	}
	return f.SetColStyle(name, column, style)
}

func writeCell(f *excelize.File, name, at string, c Column, cell Cell, u Units) error {
	switch {
	case cell.unit:
		return f.SetCellStr(name, at, c.Format(cell, u))
	case cell.Known:
		dimension, _ := cell.in(c)
		if err := f.SetCellFloat(name, at, cell.Value*u.of(dimension).factor, -1, 64); err != nil {
			return err
		}
		if cell.own {
			return nil // the column's format does not fit every row
		}
		column := strings.TrimRight(at, "0123456789")
		style, err := f.GetColStyle(name, column)
		if err != nil {
			return err
		}
		return f.SetCellStyle(name, at, at, style)
	case cell.Text != "":
		text := []rune(visible(cell.Text))
		if len(text) > maxCellText {
			text = append(text[:maxCellText-1], '…')
		}
		return f.SetCellStr(name, at, string(text))
	}
	return nil
}

// sheetNames makes a sheet name of each table's: at most 31 characters, none of
// the forbidden ones, none twice.
func sheetNames(tables []*Table) []string {
	used := map[string]bool{}
	names := make([]string, len(tables))
	for i, t := range tables {
		base := strings.Map(func(r rune) rune {
			if strings.ContainsRune(`:\/?*[]'`, r) {
				return '-'
			}
			return r
		}, t.Name)
		if r := []rune(base); len(r) > 28 {
			base = string(r[:28])
		}
		n := base
		for k := 2; used[strings.ToLower(n)]; k++ {
			n = fmt.Sprintf("%s %d", base, k)
		}
		used[strings.ToLower(n)] = true
		names[i] = n
	}
	return names
}
