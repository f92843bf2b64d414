package intake

import (
	"math"
	"strconv"

	"pastload/profile"
)

// number formats a value for a message: as few digits as tell it, at most four unless whole.
func number(v float64) string {
	if v == math.Trunc(v) && math.Abs(v) < 1e9 {
		return strconv.FormatFloat(v, 'f', -1, 64)
	}
	return strconv.FormatFloat(v, 'g', 4, 64)
}

// metres shows a depth as it was typed where it was typed in metres.
func metres(n profile.Number) string {
	if n.Source != nil {
		if u, ok := length.find(n.Source.Unit); ok && u.name == "m" && scan(n.Source.Text).kind == aNumber {
			return clean(n.Source.Text)
		}
	}
	return strconv.FormatFloat(n.Value, 'f', 2, 64)
}
