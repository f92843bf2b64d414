package intake

import (
	"strconv"
	"time"
)

// serialDate turns the serial number by which a workbook stores a day into an
// ISO date, and leaves every other text alone. Day 1 is 1900-01-01, or
// 1904-01-02 in workbooks that count from 1904; the day that 1900 never had is
// counted too, so the origin lies a day earlier after it.
func serialDate(text string, from1904 bool) string {
	v, err := strconv.ParseFloat(text, 64)
	if err != nil || v < 61 || v > 2_958_465 {
		return text
	}
	origin := time.Date(1899, 12, 30, 0, 0, 0, 0, time.UTC)
	if from1904 {
		origin = time.Date(1904, 1, 1, 0, 0, 0, 0, time.UTC)
	}
	return origin.AddDate(0, 0, int(v)).Format(time.DateOnly)
}
