package sheet

import (
	"fmt"
	"math"
	"strings"

	"pastload/profile/oedometer"
	"pastload/render/draw"
)

// drawSummary writes the result with its reasons in a box.
func (s *curveSheet) drawSummary() {
	s.c.Rect(s.summary, draw.Pen{Width: draw.Thin}, draw.Fill{})
	left, width := s.summary.Left+1.5, s.summary.Width()-3
	y := s.summary.Top + 1 + s.f.heading.Line()
	s.c.Text(left, y, draw.Text(s.f.heading.Fit(s.result(), width)), s.f.heading)
	y += 0.6
	bottom := s.summary.Bottom - 0.8
	lines := s.summaryLines()
	for i, text := range lines {
		wrapped := s.f.small.Wrap(text, width, 6)
		if y+float64(len(wrapped))*s.f.small.Line() > bottom || i+1 < len(lines) && y+float64(len(wrapped)+1)*s.f.small.Line() > bottom {
			s.c.Text(left, y+s.f.small.Line(), draw.Text(fmt.Sprintf("and %d more in the report", len(lines)-i)), s.f.small)
			return
		}
		for _, l := range wrapped {
			y += s.f.small.Line()
			s.c.Text(left, y, draw.Text(l), s.f.small)
		}
	}
}

// result is the heading of the summary.
func (s *curveSheet) result() string {
	if !s.in.Specimen.Interpreted {
		return "Not interpreted"
	}
	out := s.yieldWords()
	if v, ok := value(s.in.Specimen.Effective); ok && v > 0 && s.r.Preconsolidation.Bound == oedometer.Exact && s.r.Preconsolidation.Best > 0 {
		out += ", OCR " + ratio(s.r.Preconsolidation.Best/v)
	}
	return out + ", grade " + s.r.Grade
}

// summaryLines is what a checker needs to follow the reading, in the order in
// which it is needed.
func (s *curveSheet) summaryLines() []string {
	if !s.in.Specimen.Interpreted {
		return append(append([]string(nil), s.in.Specimen.Notes...), s.readings()...)
	}
	r := s.r
	var out []string
	if len(r.Reasons) > 0 {
		out = append(out, "Grade: "+strings.Join(r.Reasons, "; ")+".")
	}
	slopes := ""
	add := func(known bool, name string, v float64, how string) {
		if !known || !finite(v) {
			return
		}
		if slopes != "" {
			slopes += ", "
		}
		slopes += name + " " + decimals(v, 3)
		if how != "" {
			slopes += " (" + how + ")"
		}
	}
	add(r.CompressionIndex.Known, "Cc", r.CompressionIndex.Value, r.VirginSteepest.Rule)
	add(r.CompressionRatio.Known, "CR", r.CompressionRatio.Value, "")
	add(r.SwellingIndex.Known, "Cs", r.SwellingIndex.Value, "")
	add(r.RecompressionRatio.Known, "RR", r.RecompressionRatio.Value, "")
	add(r.RecompressionIndex.Known, "Cr", r.RecompressionIndex.Value, r.RecompressionIndex.How)
	if slopes != "" {
		out = append(out, "Slopes per log cycle: "+slopes+".")
	}
	if r.Field.Known {
		out = append(out, fmt.Sprintf("Field curve (Schmertmann 1955): Cc %s, %s times the laboratory's, to 0.42 e0.", decimals(r.Field.CompressionIndex, 3), decimals(r.Field.Ratio, 2)))
	} else if r.Field.Reason != "" {
		out = append(out, "No field curve: "+r.Field.Reason+".")
	}
	for _, q := range r.Quality {
		switch {
		case q.Applies:
			out = append(out, fmt.Sprintf("Sample, %s: %s; %s.", q.Scheme, q.Class, q.Reason))
		case q.Reason != "":
			out = append(out, fmt.Sprintf("Sample, %s: not rated, %s.", q.Scheme, q.Reason))
		}
	}
	if r.MaxStressRatio > 0 && finite(r.MaxStressRatio) {
		load := fmt.Sprintf("Loading: highest stress %s kPa, %.1f times the apparent σ′p", significant(r.MaxStress), r.MaxStressRatio)
		if r.BracketLow > 0 && r.BracketHigh > 0 {
			load += fmt.Sprintf("; load step around it %s to %s kPa", significant(r.BracketLow), significant(r.BracketHigh))
		}
		out = append(out, load+".")
	}
	for _, l := range r.Loops {
		if l.Ratio > 0 && finite(l.Ratio) {
			out = append(out, fmt.Sprintf("Loop: the known past maximum of %s kPa reads as %s kPa on reloading, ratio %.2f.", significant(l.PastMaximum), significant(l.Recovered.Best), l.Ratio))
		} else if l.Reason != "" {
			out = append(out, fmt.Sprintf("Loop from %s kPa: no check, %s.", significant(l.PastMaximum), l.Reason))
		}
	}
	for _, n := range r.Notes {
		out = append(out, "Note: "+n+".")
	}
	var refused []string
	for i := range r.Methods {
		if m := &r.Methods[i]; !m.Known && m.Note != "" {
			refused = append(refused, m.Name+" ("+m.Note+")")
		}
	}
	if len(refused) > 0 {
		out = append(out, "Gave no value: "+strings.Join(refused, "; ")+".")
	}
	return append(out, s.readings()...)
}

// readings lists the points of a test that is short enough to be checked by
// hand.
func (s *curveSheet) readings() []string {
	if len(s.points) > mostNumbered {
		return nil
	}
	var list []string
	for _, p := range s.points {
		list = append(list, fmt.Sprintf("%d: %g, %.4f", p.number, math.Round(p.EffectiveStress*100)/100, p.VoidRatio))
	}
	return []string{"Readings (number: σ′ in kPa, e): " + strings.Join(list, "; ") + "."}
}

// key explains the symbols that this sheet uses.
func (s *curveSheet) key() []keyItem {
	var items []keyItem
	var seen [len(branches)]bool
	seating := false
	for _, p := range s.points {
		if int(p.Branch) < len(seen) && p.Branch >= 0 {
			seen[p.Branch] = true
		}
		seating = seating || p.Seating
	}
	marked := len(s.points) <= mostMarked
	for b := range branches {
		if !seen[b] {
			continue
		}
		k := branches[b]
		items = append(items, keyItem{9, func(c *draw.Canvas, x, y float64) {
			c.Line(x-4.5, y, x+4.5, y, k.pen)
			if marked {
				c.Marker(x, y, draw.Marker{Shape: k.marker.Shape, Solid: k.marker.Solid, Size: 1.8})
			}
		}, draw.Text(k.name)})
	}
	if seating && marked {
		items = append(items, keyMarker(draw.Marker{Shape: draw.Circle, Size: 1.2}, draw.Text("seating, not in fits")))
	}
	if !s.in.Specimen.Interpreted {
		return items
	}
	if s.r.VirginSteepest.Known {
		items = append(items, keyLine(virginPen, draw.Text("virgin line")))
	}
	if l := s.r.VirginLast; l.Known && l.Rule != s.r.VirginSteepest.Rule {
		items = append(items, keyLine(lastPen, draw.Text("virgin line by last points")))
	}
	if s.r.Field.Known {
		items = append(items, keyLine(fieldPen, draw.Text("in the ground")))
	}
	for _, m := range s.methods() {
		if pen, ok := constructionPens[m.ID]; ok {
			items = append(items, keyLine(pen, draw.Text(s.letter(m))))
		}
	}
	return append(items,
		keyMarker(draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.8}, draw.Text("as constructed (hollow: not used)")),
		keyRange(draw.Pen{Width: draw.Thin}, draw.Text("5 to 95 % after known bias")))
}

// paragraphs define what the sheet shows.
func (s *curveSheet) paragraphs() []string {
	text := "Points are joined by straight lines."
	if len(s.points) <= mostNumbered {
		text = "Points are numbered in the order of the test and joined by straight lines."
	}
	if s.in.Specimen.Interpreted {
		text += " Grey band: 5 to 95 % range of σ′p. Constructions in other planes (work, bilogarithmic) are in the strip only."
	}
	if s.in.Sources != "" {
		text += " Data: " + s.in.Sources + "."
	}
	return []string{text}
}
