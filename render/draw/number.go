package draw

import (
	"bytes"
	"io"
	"math"
	"strconv"
)

// round returns v to the 0.01 mm, with no negative zero. The explicit
// conversion keeps a product from being fused into a following sum, which would
// give other last digits on other machines.
func round(v float64) float64 {
	r := math.Round(float64(v*100)) / 100
	if r == 0 {
		return 0
	}
	return r
}

// appendNumber appends v to two decimals, without trailing zeros.
func appendNumber(b []byte, v float64) []byte {
	n := int64(math.Round(float64(v * 100)))
	if n < 0 {
		b, n = append(b, '-'), -n
	}
	b = strconv.AppendInt(b, n/100, 10)
	if n %= 100; n == 0 {
		return b
	}
	b = append(b, '.', byte('0'+n/10))
	if n %= 10; n > 0 {
		b = append(b, byte('0'+n))
	}
	return b
}

// format returns v to two decimals, without trailing zeros.
func format(v float64) string { return string(appendNumber(nil, v)) }

// finite reports whether all values can be drawn. A coordinate beyond 1 km of
// paper is as wrong as one that is not a number.
func finite(values ...float64) bool {
	const farthest = 1e6
	for _, v := range values {
		if math.IsNaN(v) || math.Abs(v) > farthest {
			return false
		}
	}
	return true
}

// A trimmer cuts the trailing zeros that svgo prints: x="12.50" becomes
// x="12.5" and x="3.00" becomes x="3". svgo writes each opening tag in one
// call, and escaped text never begins with "<", so that only the numbers of
// tags are touched.
type trimmer struct {
	to  io.Writer
	buf []byte
}

func (t *trimmer) Write(p []byte) (int, error) {
	if len(p) == 0 || p[0] != '<' {
		return t.to.Write(p)
	}
	t.buf = t.buf[:0]
	for rest := p; len(rest) > 0; {
		i := bytes.IndexByte(rest, '"')
		if i < 0 {
			t.buf = append(t.buf, rest...)
			break
		}
		j := bytes.IndexByte(rest[i+1:], '"')
		if j < 0 {
			t.buf = append(t.buf, rest...)
			break
		}
		value := rest[i+1 : i+1+j]
		t.buf = append(t.buf, rest[:i+1]...)
		t.buf = append(t.buf, trimZeros(value)...)
		t.buf = append(t.buf, '"')
		rest = rest[i+2+j:]
	}
	if _, err := t.to.Write(t.buf); err != nil {
		return 0, err
	}
	return len(p), nil
}

// trimZeros cuts the trailing zeros of a decimal number; anything else comes
// back as it is.
func trimZeros(v []byte) []byte {
	point := bytes.IndexByte(v, '.')
	if point < 0 || len(v)-point != 3 {
		return v
	}
	for i, c := range v {
		if i != point && (c < '0' || c > '9') && (i > 0 || c != '-') {
			return v
		}
	}
	return bytes.TrimRight(bytes.TrimRight(v, "0"), ".")
}
