package intake

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"strconv"
	"strings"

	"github.com/xuri/excelize/v2"
)

// maxUnzipped is how large a workbook may grow when it is unpacked.
const maxUnzipped = 256 << 20 // bytes

// openWorkbook reads the sheets that carry the names of tables. Values are
// taken as stored, not as displayed: a display rounds.
func (rd *reader) openWorkbook(fsys fs.FS, name string, grids map[Table]*grid) {
	data, ok := rd.bytes(fsys, name, "")
	if !ok {
		return
	}
	// A workbook is a zip archive of foreign making. Should the library fail on
	// one in a way of its own, that is the file's problem and not ours.
	defer func() {
		if r := recover(); r != nil {
			rd.add(Problem{File: name, Message: "the workbook is damaged", Wanted: "a workbook that a spreadsheet program opens and saves as .xlsx"})
		}
	}()
	f, err := excelize.OpenReader(bytes.NewReader(data), excelize.Options{RawCellValue: true, UnzipSizeLimit: maxUnzipped, UnzipXMLSizeLimit: maxUnzipped})
	if err != nil {
		rd.add(Problem{File: name, Message: workbookFault(err), Wanted: "a workbook without a password, saved as .xlsx"})
		return
	}
	defer f.Close() // only temporary files of the library
	date1904 := false
	if p, err := f.GetWorkbookProps(); err == nil && p.Date1904 != nil {
		date1904 = *p.Date1904
	}
	from := map[Table]string{}
	for _, sheet := range f.GetSheetList() {
		t, ok := tableOf(sheet)
		file := name + ":" + sheet
		if !ok {
			rd.note(file, "is not one of the tables and was not read")
			continue
		}
		if other, twice := from[t]; twice {
			rd.add(Problem{File: file, Name: string(t), Message: "the table is there already as " + other, Wanted: "one sheet for each table"})
			continue
		}
		from[t] = sheet
		rd.source(file, t, data, "workbook")
		if visible, err := f.GetSheetVisible(sheet); err == nil && !visible {
			rd.noteFile(file, "the sheet is hidden; it was read all the same")
		}
		if g := rd.readSheet(f, sheet, file, t); g != nil {
			g.date1904 = date1904
			grids[t] = g
		}
	}
	if len(from) == 0 {
		rd.add(Problem{File: name, Message: "no sheet is named like a table", Wanted: "sheets named boreholes, strata, water, results, oedometer, cone, history, decisions or settings"})
	}
}

// workbookFault says in words why a workbook cannot be opened.
func workbookFault(err error) string {
	switch {
	case errors.Is(err, excelize.ErrWorkbookPassword), errors.Is(err, excelize.ErrUnsupportedEncryptMechanism):
		return "the workbook is protected by a password"
	case strings.Contains(err.Error(), "unzip size"):
		return fmt.Sprintf("the workbook unpacks to more than %d MB", maxUnzipped>>20)
	}
	return "is not a workbook that can be read"
}

// readSheet reads one sheet into a grid: row numbers are lines, columns fields.
func (rd *reader) readSheet(f *excelize.File, sheet, file string, t Table) *grid {
	g := &grid{file: file, table: t, point: true, sheet: true}
	rows, err := f.Rows(sheet)
	if err != nil {
		rd.add(Problem{File: file, Name: string(t), Message: "the sheet cannot be read", Wanted: "a sheet of cells"})
		return nil
	}
	defer rows.Close()
	displayed, err := f.Rows(sheet)
	if err != nil {
		rd.add(Problem{File: file, Name: string(t), Message: "the sheet cannot be read", Wanted: "a sheet of cells"})
		return nil
	}
	defer displayed.Close()
	hidden := 0
	for line := 1; rows.Next(); line++ {
		fields, err := rows.Columns(excelize.Options{RawCellValue: true})
		if err != nil {
			rd.add(Problem{File: file, Line: line, Name: string(t), Message: "the row cannot be read", Wanted: "a workbook that a spreadsheet program opens and saves as .xlsx"})
			break
		}
		if len(fields) > maxFields {
			rd.add(Problem{File: file, Line: line, Name: string(t), Message: fmt.Sprintf("a row of %d columns", len(fields)), Wanted: fmt.Sprintf("at most %d", maxFields)})
			break
		}
		if len(fields) > 0 && line > maxRows {
			rd.add(Problem{File: file, Line: line, Name: string(t), Message: fmt.Sprintf("cells below row %d", maxRows), Wanted: "a table that ends above it"})
			break
		}
		if displayed.Next() {
			shown, err := displayed.Columns(excelize.Options{RawCellValue: false})
			if err == nil {
				asPercent(fields, shown)
			}
		}
		if rows.GetRowOpts().Hidden && len(fields) > 0 {
			hidden++
		}
		if !rd.take(g, gridRow{line: line, fields: fields}) {
			break
		}
	}
	if hidden > 0 {
		rd.noteFile(file, fmt.Sprintf("%d hidden rows were read all the same", hidden))
	}
	if merged, err := f.GetMergeCells(sheet, true); err == nil && len(merged) > 0 {
		rd.noteFile(file, fmt.Sprintf("%d merged cells: each counts as its first cell, the others are blank", len(merged)))
	}
	if g.header.fields == nil {
		rd.add(Problem{File: file, Name: string(t), Message: "the sheet is empty", Wanted: "a header row with the columns " + requiredColumns(t)})
		return nil
	}
	rd.uncalculated(f, sheet, g)
	return g
}

// asPercent writes the cells that a sheet displays in percent as such: 45 % is
// stored as 0.45, and beneath a header "w (%)" that would be a hundredth of what
// everybody sees.
func asPercent(stored, displayed []string) {
	for i, s := range stored {
		if i >= len(displayed) || !strings.HasSuffix(displayed[i], "%") || strings.HasSuffix(s, "%") {
			continue
		}
		if v, err := strconv.ParseFloat(s, 64); err == nil {
			// 15 digits are what a spreadsheet computes with and shows.
			stored[i] = strconv.FormatFloat(v*100, 'g', 15, 64) + "%"
		}
	}
}

// uncalculated reports formulas whose value was never stored: they read as
// blank, and blank would mean not measured.
func (rd *reader) uncalculated(f *excelize.File, sheet string, g *grid) {
	width := len(trimRight(g.header.fields))
	for _, r := range g.rows {
		for i := range width {
			if r.field(i) != "" {
				continue
			}
			cell, err := excelize.CoordinatesToCellName(i+1, r.line)
			if err != nil {
				continue
			}
			if formula, err := f.GetCellFormula(sheet, cell); err == nil && formula != "" {
				rd.add(Problem{File: g.file, Line: r.line, Column: i + 1, Name: clean(g.header.field(i)),
					Message: fmt.Sprintf("cell %s holds a formula that was never calculated", cell), Wanted: "the workbook opened in a spreadsheet program and saved"})
			}
		}
	}
}
