package correlate_test

import (
	"errors"
	"fmt"
	"strings"

	"pastload/correlate"
)

func ExampleCorrelation_Evaluate() {
	c, _ := correlate.ByID("terzaghi-peck-1967")
	e, err := c.Evaluate(correlate.Values{"LL": 45})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%s, %s\n", c.Name, c.Formula)
	fmt.Printf("Cc %.3f (%.2f to %.2f), %s\n", e.Value, e.Low, e.High, c.Verified)

	_, err = c.Evaluate(correlate.Values{"w": 40})
	fmt.Println(errors.Is(err, correlate.ErrMissingInput), err)
	// Output:
	// Terzaghi & Peck (1967), Cc = 0.009·(LL − 10)
	// Cc 0.315 (0.17 to 0.57), formula read in a source
	// true missing input: terzaghi-peck-1967 needs liquid limit (LL)
}

func ExampleBandOf() {
	b, err := correlate.BandOf(correlate.CompressionIndex, correlate.Values{"e0": 1.10, "LL": 52, "w": 40}, nil)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("Cc %.2f (%.2f to %.2f)\n", b.Best, b.Low, b.High)
	for _, m := range b.Members {
		if m.Speaks {
			fmt.Printf("%-28s %.2f\n", m.Correlation.ID, m.Estimate.Value)
		}
	}
	// Output:
	// Cc 0.36 (0.21 to 0.61)
	// terzaghi-peck-1967           0.38
	// al-khafaji-andersland-1992   0.33
	// koppula-1981                 0.40
	// azzouz-1976-e0-ll            0.34
}

// Columns that follow from the stress history: undrained strength in the form
// S·σ′v0·OCR^m, and the coefficient of earth pressure at rest.
func ExampleCorrelation_Evaluate_stressHistory() {
	here := correlate.Values{"effective": 60, "preconsolidation": 150, "phi": 25}
	for _, id := range []string{"ladd-1991-clay", "mayne-kulhawy-1982"} {
		c, _ := correlate.ByID(id)
		e, err := c.Evaluate(here)
		if err != nil {
			fmt.Println(err)
			return
		}
		value := strings.TrimSpace(fmt.Sprintf("%.2f %s", e.Value, c.Quantity.Unit()))
		fmt.Printf("%s %s, %s\n", c.Quantity.Symbol(), value, c.Verified)
		for _, u := range e.Used {
			if u.Derived != "" {
				fmt.Printf("  %s = %s = %.2f\n", u.Written, u.Derived, u.Value)
			}
		}
	}
	// Output:
	// su 27.47 kPa, from memory, unverified
	//   OCR = σ′p/σ′v0 = 2.50
	// K0 0.85, from memory, unverified
	//   OCR = σ′p/σ′v0 = 2.50
}

func ExampleValues_Contradictions() {
	v := correlate.Values{"w": 50, "PL": 20, "PI": 30, "LI": 0.5}
	fmt.Println(v.Contradictions()[0])
	// Output:
	// LI given as 0.5, but (w − PL)/PI is 1: one of w, PL, PI and LI is not of this specimen, or is mistyped
}
