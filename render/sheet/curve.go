package sheet

import (
	"errors"
	"fmt"
	"io"
	"math"

	"pastload/profile"
	"pastload/profile/oedometer"
	"pastload/render/axis"
	"pastload/render/draw"
)

// ErrNoCurve is returned for a specimen whose record gave no curve to draw.
var ErrNoCurve = errors.New("the specimen has no compression curve")

// CurveInput is what a curve sheet is drawn from.
type CurveInput struct {
	Specimen  profile.Specimen
	Settings  profile.Settings
	Page      Page   // A4 where zero
	Figure    string // figure number, "" to be filled in by hand
	Sheet, Of int    // sheet n of m, 0 to be filled in by hand
	Sources   string // where the data came from
	ID        string // prefix of the ids in the drawing; the specimen's name where empty
}

// Curve writes the sheet of one oedometer specimen: void ratio against log σ′
// with all branches, the constructions as fine lines, what each of them gives on
// the same axis of stress, the work per unit volume, and a summary that can be
// followed by hand. The error wraps ErrNoCurve where there is nothing to draw, or
// is the writer's; then nothing is written.
func Curve(w io.Writer, in CurveInput) error {
	if in.Page.Width == 0 {
		in.Page = A4
	}
	if in.ID == "" {
		in.ID = "curve-" + in.Specimen.Name
	}
	s := &curveSheet{in: in, r: &in.Specimen.Interpretation, f: in.Page.fonts()}
	for i, p := range in.Specimen.Prepared.Points {
		if p.EffectiveStress > 0 && finite(p.EffectiveStress) && finite(p.VoidRatio) {
			s.points = append(s.points, curvePoint{p, i + 1})
		}
	}
	if len(s.points) == 0 {
		return fmt.Errorf("curve sheet of %q: %w", in.Specimen.Name, ErrNoCurve)
	}
	s.c = draw.New(draw.Sheet{
		Width: in.Page.Width, Height: in.Page.Height, ID: in.ID,
		Title: "Compression curve, specimen " + in.Specimen.Name, Description: s.describe(),
	})
	s.layOut()
	s.header()
	s.drawMain()
	s.drawStrip()
	s.drawWork()
	s.drawSummary()
	s.caption.draw(s.c, s.captionBox.Left, s.captionBox.Top)
	titleBlock(s.c, in.Page.frame(), in.Settings.Title, Figure{
		Number: in.Figure, Sheet: in.Sheet, Of: in.Of, Title: "compression curve, specimen " + in.Specimen.Name,
		Scale: "–", Paper: in.Page.Name,
	})
	return s.c.Finish(w)
}

// A curvePoint is a point with its number on the sheet.
type curvePoint struct {
	oedometer.Point
	number int
}

// curveSheet is a curve sheet being drawn.
type curveSheet struct {
	in     CurveInput
	r      *oedometer.Interpretation
	c      *draw.Canvas
	f      fonts
	points []curvePoint

	later []func() // labels, written when all lines are drawn

	main       chart
	strip      draw.Box // what each construction gives, below the curve
	work       draw.Box
	summary    draw.Box
	caption    caption
	captionBox draw.Box
}

// describe states the result in a sentence.
func (s *curveSheet) describe() string {
	if !s.in.Specimen.Interpreted {
		return fmt.Sprintf("%d points; not interpreted.", len(s.points))
	}
	out := s.yieldWords() + ", grade " + s.r.Grade + "."
	if s.r.CompressionIndex.Known {
		out += " Compression index " + decimals(s.r.CompressionIndex.Value, 2) + "."
	}
	return out
}

// yieldWords is the preconsolidation stress with its range, or the bound.
func (s *curveSheet) yieldWords() string {
	y := s.r.Preconsolidation
	switch {
	case !s.in.Specimen.Interpreted || y.Bound == oedometer.Undetermined || !finite(y.Best) || y.Best <= 0:
		return "σ′p not determined"
	case y.Bound == oedometer.AtLeast:
		return "σ′p at least " + significant(y.Best) + " kPa"
	case y.Bound == oedometer.AtMost:
		return "σ′p at most " + significant(y.Best) + " kPa"
	}
	return fmt.Sprintf("σ′p = %s kPa (%s to %s)", significant(y.Best), significant(y.Low), significant(y.High))
}

// stripRow is the height of one construction in the strip, in mm.
func (s *curveSheet) stripRow() float64 { return 1.3 * s.f.small.Line() }

// layOut shares the page out. On the smaller page the work and the summary stand
// below the curve, on the larger one beside it.
func (s *curveSheet) layOut() {
	page := s.in.Page
	frame := page.frame()
	block := draw.Box{Left: frame.Right - blockWidth, Top: frame.Bottom - blockHeight, Right: frame.Right, Bottom: frame.Bottom}
	s.captionBox = draw.Box{Left: frame.Left, Right: frame.Right, Bottom: block.Top - 1}
	if page.wide {
		s.captionBox.Right, s.captionBox.Bottom = block.Left-4, frame.Bottom
	}
	s.caption = newCaption(s.f.small, s.captionBox.Width(), s.key(), s.paragraphs(), 3)
	s.captionBox.Top = s.captionBox.Bottom - s.caption.height()
	strip := float64(len(s.methods())+1)*s.stripRow() + 2
	if !s.in.Specimen.Interpreted {
		strip = 0
	}
	const (
		side   = 12.0 // for the labels of the upright axes
		above  = 16.0 // header, names of the axes
		across = 11.0 // labels and name of the axis across
		gap    = 4.0
		lower  = 66.0 // height of work plot and summary on the smaller page
		beside = 132.0
	)
	curve := draw.Box{Left: frame.Left + side, Top: frame.Top + above, Right: frame.Right - side, Bottom: s.captionBox.Top - strip - across - gap}
	if page.wide {
		curve.Right -= beside
		s.summary = draw.Box{Left: frame.Right - beside + gap, Top: frame.Top + above, Right: frame.Right, Bottom: block.Top - gap - 90}
		s.work = draw.Box{Left: s.summary.Left + side, Top: s.summary.Bottom + 8, Right: frame.Right - 2, Bottom: block.Top - gap - across}
		curve.Bottom = math.Min(curve.Bottom, block.Top-gap-strip-across)
	} else {
		curve.Bottom -= lower
		s.work = draw.Box{Left: frame.Left + side, Top: s.captionBox.Top - lower + 6, Right: frame.Left + 76, Bottom: s.captionBox.Top - across - 2}
		s.summary = draw.Box{Left: s.work.Right + 5, Top: s.captionBox.Top - lower, Right: frame.Right, Bottom: s.captionBox.Top - 2}
	}
	if !s.in.Specimen.Interpreted {
		s.summary.Left = math.Min(s.summary.Left, s.work.Left)
	}
	s.strip = draw.Box{Left: curve.Left, Top: curve.Bottom + across, Right: curve.Right, Bottom: curve.Bottom + across + strip}
	s.main = chart{c: s.c, f: s.f, box: curve}
	s.scales()
}

// scales chooses the window: the points, the stress in the ground and the
// preconsolidation stress; lines that leave it are cut.
func (s *curveSheet) scales() {
	low, high := math.Inf(1), 0.0
	least, most := math.Inf(1), math.Inf(-1)
	see := func(v float64) {
		if finite(v) && v > 0 {
			low, high = math.Min(low, v), math.Max(high, v)
		}
	}
	seeVoid := func(e float64) {
		if finite(e) {
			least, most = math.Min(least, e), math.Max(most, e)
		}
	}
	for _, p := range s.points {
		see(p.EffectiveStress)
		seeVoid(p.VoidRatio)
	}
	if v, ok := value(s.in.Specimen.Effective); ok {
		see(v)
	}
	if s.in.Specimen.Interpreted {
		see(s.r.Preconsolidation.Low)
		see(s.r.Preconsolidation.High)
		if s.r.InitialVoidRatio > 0 {
			seeVoid(s.r.InitialVoidRatio)
		}
	}
	s.main.x = axis.NewLog(low*0.75, high*1.35, s.main.box.Left, s.main.box.Right)
	margin := 0.06 * math.Max(most-least, 0.01)
	least, most, _ = axis.Round(math.Max(0, least-margin), most+margin, 10)
	s.main.y = axis.NewLinear(least, most, s.main.box.Bottom, s.main.box.Top)
}

// methods returns the constructions that gave a value.
func (s *curveSheet) methods() []*oedometer.Method {
	var out []*oedometer.Method
	for i := range s.r.Methods {
		if m := &s.r.Methods[i]; m.Known && finite(m.Stress) && m.Stress > 0 {
			out = append(out, m)
		}
	}
	return out
}

// letter names a construction on the sheet.
func (s *curveSheet) letter(m *oedometer.Method) string {
	for i := range s.r.Methods {
		if &s.r.Methods[i] == m {
			return string(rune('a' + i%26))
		}
	}
	return ""
}

// header writes what was tested.
func (s *curveSheet) header() {
	sp := &s.in.Specimen
	frame := s.in.Page.frame()
	what := draw.Text("Oedometer compression curve")
	s.c.Text(frame.Right, frame.Top+4.6, what, anchored(bold(s.f.body), draw.End))
	name := "Specimen " + sp.Name
	if sp.Borehole != "" {
		name += ", borehole " + sp.Borehole
	}
	if v, ok := value(sp.Depth); ok {
		name += ", " + metres(v) + " m"
	}
	s.c.Text(frame.Left, frame.Top+4.6, draw.Text(s.f.title.Fit(name, frame.Width()-s.f.body.Width(what)-10)), s.f.title)
	line := s.r.Kind.String()
	if sp.TestKind != "" {
		line = sp.TestKind
	}
	if line == "" {
		line = "kind of test not given"
	}
	if e := sp.Prepared.InitialVoidRatio; e > 0 && finite(e) {
		line += fmt.Sprintf(" · e0 = %.3f (%s)", e, sp.Prepared.InitialVoidRatioHow)
	}
	s.c.Text(frame.Left, frame.Top+8.5, draw.Text(s.f.small.Fit(line, frame.Width())), s.f.small)
}
