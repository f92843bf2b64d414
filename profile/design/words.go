package design

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// figures writes a value with so many significant figures and no exponent.
func figures(v float64, n int) string {
	if v == 0 || math.Abs(v) < 1e-6 {
		return "0"
	}
	digits := max(0, min(n-1-int(math.Floor(math.Log10(math.Abs(v)))), 8))
	return strconv.FormatFloat(v, 'f', digits, 64)
}

// number writes a value as results are given: three significant figures.
func number(v float64) string { return figures(v, 3) }

// rough writes what is known only roughly: a slope, a scatter.
func rough(v float64) string { return figures(v, 2) }

// quantityText writes a value with its unit.
func quantityText(v float64, unit string) string {
	return withUnit(number(v), unit)
}

func withUnit(text, unit string) string {
	switch unit {
	case "":
		return text
	case "kN/m3":
		unit = "kN/m³"
	}
	return text + " " + unit
}

func percent(share float64) string { return strconv.Itoa(int(math.Round(100*share))) + " %" }

func metres(v float64) string { return strconv.FormatFloat(v, 'f', 2, 64) + " m" }

// chance writes a chance without pretending to more than it knows.
func chance(p float64) string {
	if p < 0.001 {
		return "p < 0.001"
	}
	return "p = " + figures(p, 1)
}

// values writes "one value is" or "5 values are".
func values(n int, one, more string) string {
	if n == 1 {
		return "one value " + one
	}
	return fmt.Sprintf("%d values %s", n, more)
}

// sentence begins a text with a capital.
func sentence(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}
