package report

import (
	"fmt"
	"strings"

	"pastload/correlate"
	"pastload/profile"
)

// Catalogue lists correlations, a row each.
func Catalogue(all []correlate.Correlation) *Table {
	t := &Table{
		Name: "correlations", Title: "Correlations",
		Columns: []Column{
			{"name", "id", Words, 0}, {"quantity", "quantity", Words, 0}, {"formula", "formula", Words, 0},
			{"soil", "soil", Words, 0}, {"family", "family", Words, 0}, {"coefficients", "verified", Words, 0}, {"source", "source", Words, 0},
		},
		Note: "Correlations of one family rest on the same data or assumption and count once. Those from memory, unverified, must be checked in their source before they are relied on.",
	}
	for _, c := range all {
		t.Add(T(c.ID), T(string(c.Quantity)), T(c.Formula), T(c.Soil), T(c.Family), T(c.Verified.String()), T(c.Source))
	}
	return t
}

// Relations lists the correlations that the numbers of a profile rest on, with
// how far the coefficients of each were checked.
func Relations(p *profile.Profile) *Table {
	used := map[string]bool{}
	for i := range p.Boreholes {
		b := &p.Boreholes[i]
		for _, d := range b.Results {
			for _, c := range d.Correlations {
				if c.Counts {
					used[c.ID] = true
				}
			}
		}
		if b.Cone != nil {
			for _, id := range []string{"mayne-1995-qnet", "chen-mayne-1996-du2", "mayne-2005-qeff"} {
				used[id] = true
			}
		}
		for _, pt := range b.Points {
			used[profile.StrengthByHistory] = used[profile.StrengthByHistory] || pt.UndrainedStrength.Known
			if pt.K0.Known {
				used[profile.K0ByHistory], used[profile.FrictionByIndex] = true, true
			}
		}
	}
	var rows []correlate.Correlation
	for _, c := range correlate.All() {
		if used[c.ID] {
			rows = append(rows, c)
		}
	}
	t := Catalogue(rows).Only("id", "quantity", "formula", "verified", "source").Named("Correlations that these numbers rest on")
	t.Name = "relations"
	return t
}

// LeftOut lists the relations that the catalogue does not have, and why.
func LeftOut() *Table {
	t := &Table{Name: "left-out", Title: "Relations that are left out", Columns: []Column{{"relation", "relation", Words, 0}, {"reason", "reason", Words, 0}}}
	for _, o := range correlate.LeftOut() {
		t.Add(T(o.Name), T(o.Reason))
	}
	return t
}

// Explain tells everything about one correlation.
func Explain(c correlate.Correlation) *Table {
	t := &Table{Name: "correlation", Title: c.Name, Columns: []Column{{"", "property", Words, 0}, {"", "value", Words, 0}}}
	row := func(name, value string) {
		if value != "" {
			t.Add(T(name), T(value))
		}
	}
	row("name", c.ID)
	row("quantity", string(c.Quantity)+", "+c.Quantity.Symbol()+bracketed(c.Quantity.Unit()))
	row("formula", c.Formula)
	for _, in := range c.Inputs {
		row("input", inputWords(in))
	}
	row("soil", c.Soil)
	row("made for", c.Ground.String())
	row("family", c.Family)
	row("scatter", scatterWords(c.Scatter))
	row("source", c.Source)
	row("coefficients", c.Verified.String())
	for _, caution := range c.Cautions {
		row("caution", caution)
	}
	return t
}

func inputWords(in correlate.Input) string {
	s := fmt.Sprintf("%s: %s%s", in.Symbol, in.Name, bracketed(in.Unit))
	if in.Optional {
		s += ", optional"
	}
	if in.Range.Stated {
		s += fmt.Sprintf("; range %g to %g", in.Range.Low, in.Range.High)
		if in.Basis != "" {
			s += " (" + in.Basis + ")"
		}
	}
	return s
}

func scatterWords(s correlate.Scatter) string {
	known := "assumed"
	if s.Known {
		known = "from data"
	}
	text := fmt.Sprintf("standard deviation of ln(measured/predicted) %.2f between sites, %.2f within a site; %s", s.Between, s.Within, known)
	if s.Note != "" && s.Note != known {
		text += ": " + s.Note
	}
	return text
}

func bracketed(unit string) string {
	if unit == "" {
		return ""
	}
	return " (" + unit + ")"
}

// Estimate tells what a correlation gives for some values.
func Estimate(c correlate.Correlation, e correlate.Estimate) *Table {
	t := &Table{Name: "estimate", Title: c.Name + ": " + c.Formula, Columns: []Column{{"", "property", Words, 0}, {"", "value", Words, 0}}}
	unit := ""
	if c.Quantity.Unit() != "" {
		unit = " " + c.Quantity.Unit()
	}
	for _, u := range e.Used {
		from := ""
		if u.Derived != "" {
			from = ", " + u.Derived
		}
		t.Add(T(u.Symbol), T(strings.TrimSpace(fmt.Sprintf("%.4g %s", u.Value, u.Unit))+from))
	}
	t.Add(T(c.Quantity.Symbol()), T(fmt.Sprintf("%.4g%s", e.Value, unit)))
	if e.Low != e.High {
		t.Add(T("5 to 95 %"), T(fmt.Sprintf("%.3g to %.3g%s", e.Low, e.High, unit)))
	}
	for _, w := range e.Warnings {
		t.Add(T("warning"), T(w))
	}
	t.Add(T("coefficients"), T(c.Verified.String()))
	t.Add(T("source"), T(c.Source))
	return t
}

// A CorrelationJSON is a correlation as the commands print it.
type CorrelationJSON struct {
	ID       string      `json:"id"`
	Name     string      `json:"name"`
	Quantity string      `json:"quantity"`
	Symbol   string      `json:"symbol"`
	Unit     string      `json:"unit"`
	Formula  string      `json:"formula"`
	Inputs   []InputJSON `json:"inputs"`
	Soil     string      `json:"soil"`
	Family   string      `json:"family"`
	Between  float64     `json:"scatter_between_sites_ln"`
	Within   float64     `json:"scatter_within_site_ln"`
	Known    bool        `json:"scatter_from_data"`
	Source   string      `json:"source"`
	Verified string      `json:"verified"`
	Cautions []string    `json:"cautions"`
}

// InputJSON is an input of a correlation.
type InputJSON struct {
	Symbol string   `json:"symbol"`
	Name   string   `json:"name"`
	Unit   string   `json:"unit"`
	Low    *float64 `json:"range_low"`
	High   *float64 `json:"range_high"`
}

// DescribeCorrelation returns what JSON says of one correlation.
func DescribeCorrelation(c correlate.Correlation) CorrelationJSON {
	out := CorrelationJSON{
		ID: c.ID, Name: c.Name, Quantity: string(c.Quantity), Symbol: c.Quantity.Symbol(), Unit: c.Quantity.Unit(), Formula: c.Formula,
		Soil: c.Soil, Family: c.Family, Between: c.Scatter.Between, Within: c.Scatter.Within, Known: c.Scatter.Known,
		Source: c.Source, Verified: c.Verified.String(), Cautions: c.Cautions,
	}
	for _, in := range c.Inputs {
		j := InputJSON{Symbol: in.Symbol, Name: in.Name, Unit: in.Unit}
		if p := in.Range; p.Stated {
			j.Low, j.High = &p.Low, &p.High
		}
		out.Inputs = append(out.Inputs, j)
	}
	return out
}

// A CatalogueJSON is the catalogue as the commands print it.
type CatalogueJSON struct {
	Correlations []CorrelationJSON `json:"correlations"`
}

// DescribeCatalogue returns what JSON says of correlations.
func DescribeCatalogue(all []correlate.Correlation) CatalogueJSON {
	out := CatalogueJSON{Correlations: []CorrelationJSON{}}
	for _, c := range all {
		out.Correlations = append(out.Correlations, DescribeCorrelation(c))
	}
	return out
}

// An EstimateJSON is an evaluated correlation as the commands print it.
type EstimateJSON struct {
	ID       string             `json:"id"`
	Quantity string             `json:"quantity"`
	Unit     string             `json:"unit"`
	Value    float64            `json:"value"`
	Low      float64            `json:"low"`
	High     float64            `json:"high"`
	Inputs   map[string]float64 `json:"inputs"`
	Warnings []string           `json:"warnings"`
	Verified string             `json:"verified"`
	Source   string             `json:"source"`
}

// DescribeEstimate returns what JSON says of an estimate.
func DescribeEstimate(c correlate.Correlation, e correlate.Estimate) EstimateJSON {
	out := EstimateJSON{
		ID: c.ID, Quantity: string(c.Quantity), Unit: c.Quantity.Unit(), Value: e.Value, Low: e.Low, High: e.High,
		Inputs: map[string]float64{}, Warnings: e.Warnings, Verified: c.Verified.String(), Source: strings.TrimSpace(c.Source),
	}
	for _, u := range e.Used {
		out.Inputs[u.Symbol] = u.Value
	}
	return out
}
