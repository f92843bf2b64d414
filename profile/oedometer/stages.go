package oedometer

const (
	minutesPerYear  = 525960.0 // 365.25 days
	secondsPerYear  = 60 * minutesPerYear
	waterUnitWeight = 9.81  // kN/m³
	timeFactor50    = 0.197 // Tv at 50 % (Terzaghi; common practice)
	timeFactor90    = 0.848 // Tv at 90 %
	stiffest        = 1e-9  // m²/kN; below it the stage did not compress
	mostStages      = 200   // a dense record has no stages to list
)

// stageResults returns compressibility and flow of every stage between two
// points of an incremental test; a dense record has none.
//
//	mv = (e1−e2)/((1+e1)·Δσ′)    cv = T·d²/t    k = cv·mv·γw
//
// with d half the mean height, for drainage at both ends.
func (c Curve) stageResults() []StageResult {
	if len(c.Points) > mostStages {
		return nil
	}
	var out []StageResult
	for i := 1; i < len(c.Points); i++ {
		a, b := c.Points[i-1], c.Points[i]
		change := b.EffectiveStress - a.EffectiveStress
		if change == 0 {
			continue
		}
		mv := (a.VoidRatio - b.VoidRatio) / (1 + a.VoidRatio) / change // m²/kN
		r := StageResult{From: a.EffectiveStress, To: b.EffectiveStress, Branch: b.Branch, Line: b.Line, Compressibility: 1000 * mv}
		if mv > stiffest {
			r.Modulus = Known(1 / mv)
		}
		stage := c.stages[b.Stage]
		r.Secondary = stage.Secondary
		r.Consolidation, r.ConsolidationHow = c.consolidation(stage, a.VoidRatio, b.VoidRatio)
		if r.Consolidation.Known && mv > 0 {
			r.Permeability = Known(r.Consolidation.Value / secondsPerYear * mv * waterUnitWeight)
		}
		out = append(out, r)
	}
	return out
}

// consolidation returns cv in m²/year: as given, else from t50, else from t90.
func (c Curve) consolidation(s Stage, e1, e2 float64) (Number, string) {
	if s.Consolidation.Known {
		return s.Consolidation, "as given"
	}
	if !c.InitialHeight.Known {
		return Number{}, ""
	}
	height := c.InitialHeight.Value / 1000 * (1 + (e1+e2)/2) / (1 + c.InitialVoidRatio)
	path := height / 2
	switch {
	case s.T50.Known:
		return Known(timeFactor50 * path * path / s.T50.Value * minutesPerYear), "from t50, drained at both ends"
	case s.T90.Known:
		return Known(timeFactor90 * path * path / s.T90.Value * minutesPerYear), "from t90, drained at both ends"
	}
	return Number{}, ""
}
