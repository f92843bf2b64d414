package review

import (
	"errors"
	"strings"
	"testing"

	"pastload/profile"
)

// lone makes a site of one borehole with one result below the water table.
func lone(r profile.Result) *profile.Site {
	r.Depth = profile.Known(5)
	r.Specimen = "S1"
	return &profile.Site{Settings: profile.DefaultSettings(), Boreholes: []profile.Borehole{{
		Name: "BH1", WaterTableDepth: profile.Known(1),
		Strata:  []profile.Stratum{{Soil: "clay", Top: 0, Base: 10, SaturatedUnitWeight: profile.Known(19)}},
		Results: []profile.Result{r},
	}}}
}

// Published numbers that contradict themselves, each caught by the rule that
// names the contradiction.
func TestPublishedContradictions(t *testing.T) {
	k := profile.Known
	for _, tt := range []struct {
		name, source string
		result       profile.Result
		rule         string
		severity     Severity
		says         string
	}{
		{"consolidation example row of a data dictionary", "AGS 4 dictionary, CONG example: bulk 2.12, w 21, Gs 2.65, void ratio 0.800 (read, recomputed)",
			profile.Result{UnitWeight: k(2.12 * 9.81), WaterContent: k(21), SpecificGravity: k(2.65), VoidRatio: k(0.800)}, "void-ratio-density", Error, "70 %"},
		{"limits example row of a data dictionary", "AGS 4 dictionary, LLPL example: 62 and 38 with PI 23 (read)",
			profile.Result{LiquidLimit: k(62), PlasticLimit: k(38), PlasticityIndex: k(23)}, "plasticity-arithmetic", Note, "62 − 38 = 24 %, not 23"},
		// Only e = 0.417 and Sr = 127 % were kept of its recomputation; w, Gs and γ here are a set that gives both.
		{"permeability example row of a data dictionary", "AGS 4 dictionary, PTST example: void ratio 0.375 printed, 0.417 recomputed (read)",
			profile.Result{UnitWeight: k(2.244 * 9.81), WaterContent: k(20), SpecificGravity: k(2.65), VoidRatio: k(0.375)}, "saturation", Error, ""},
		{"marine clay whose ring would weigh 7.3 Mg/m³", "consolidation exercise, 650 g in 89.1 cm³, w 35.4 %, Gs 2.72 (read)",
			profile.Result{UnitWeight: k(650 / 89.1 * 9.81), WaterContent: k(35.4), SpecificGravity: k(2.72)}, "unit-weight-range", Error, ""},
	} {
		t.Run(tt.name, func(t *testing.T) {
			var said []string
			for _, f := range mustReview(t, build(t, lone(tt.result))) {
				said = append(said, f.Rule+": "+f.Message)
				text := f.Message + strings.Join(f.Evidence, " ")
				if f.Rule == tt.rule && f.Severity == tt.severity && strings.Contains(text, tt.says) {
					return
				}
			}
			t.Errorf("%s: not caught by %s at %s with %q; found %q", tt.source, tt.rule, tt.severity, tt.says, said)
		})
	}
}

// A published curve that rises under load does not get as far as the review: it
// cannot be read at all, and the error says where. (ΔH of 0.36 mm printed at
// 80 kPa between 0.92 and 2.52, of 20 mm; read.)
func TestPublishedCurveThatRises(t *testing.T) {
	s := lone(profile.Result{})
	c := profile.Curve{Specimen: "S1", Borehole: "BH1", Depth: profile.Known(5), InitialHeight: profile.Known(20), InitialVoidRatio: profile.Known(1.5)}
	stress := []float64{5, 15, 30, 45, 60, 80, 150, 300, 500}
	fall := []float64{0.08, 0.32, 0.52, 0.68, 0.92, 0.36, 2.52, 3.68, 4.16}
	for i := range stress {
		c.Stages = append(c.Stages, profile.Stage{EffectiveStress: profile.Known(stress[i]), Height: profile.Known(20 - fall[i])})
	}
	s.Curves = []profile.Curve{c}
	_, err := profile.Build(s, profile.Options{})
	var problems profile.Problems
	if !errors.As(err, &problems) || !strings.Contains(err.Error(), "rises") {
		t.Errorf("error %v; want problems that name the rise", err)
	}
}
