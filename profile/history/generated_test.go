package history

import (
	"math"
	"math/rand"
	"os"
	"testing"

	"gonum.org/v1/gonum/mat"
)

// generated is ground of which everything is known.
type generated struct {
	in        Input
	mechanism string
	truth     []float64 // ln σ′p at the stations
	wild      []bool    // by test
}

// generate draws a site as the model says that sites are: a mechanism and its
// sizes from their priors, a departure, a scatter, and a few wild tests.
func generate(rng *rand.Rand, k *constants) generated {
	n := 6 + rng.Intn(10)
	top, gamma := 0.5+2*rng.Float64(), 6+4*rng.Float64()
	height := 8 + 17*rng.Float64()
	water := 0.5 + 1.5*rng.Float64()
	stress := func(z float64) float64 { return 17*math.Min(z, water) + gamma*math.Max(0, z-water) }
	g := generated{in: Input{Layers: []Layer{{Name: "clay", Top: top, Base: top + height}}, WaterTable: water, HasWater: true}}
	for i := range n {
		z := top + height*(float64(i)+rng.Float64())/float64(n)
		g.in.Tests = append(g.in.Tests, Test{ID: i, Depth: z, EffectiveStress: stress(z), LnSD: 0.15})
	}
	for i := range 9 {
		z := top + height*float64(i)/8
		g.in.Stations = append(g.in.Stations, Station{Depth: z, EffectiveStress: stress(z)})
	}
	pick := func(c choices) float64 {
		u := rng.Float64()
		for _, x := range c {
			if u -= x.prior; u < 0 {
				return x.value
			}
		}
		return c[len(c)-1].value
	}
	ms := newMechanisms()
	u := rng.Float64()
	m := &ms[len(ms)-1]
	for i := range ms {
		if u -= ms[i].prior; u < 0 {
			m = &ms[i]
			break
		}
	}
	g.mechanism = m.name
	p := make([]float64, len(m.parameters))
	for i, par := range m.parameters {
		p[i] = par.mean + par.sd*rng.NormFloat64()
	}
	base := &ground{top: top, base: top + height, water: water, gamma: 9.81, buoyant: 8}
	line := m.response(base, p)
	wave := k.Departures[0]
	for u, i := rng.Float64()-wave.prior, 1; u >= 0 && i < len(k.Departures); i++ {
		wave = k.Departures[i]
		u -= wave.prior
	}
	departure := drawDeparture(rng, &g.in, wave.amplitude, wave.length)
	noise := pick(k.Noises)
	for i := range g.in.Tests {
		t := &g.in.Tests[i]
		v := line(t.Depth, t.EffectiveStress) + departure[i] + noise*t.LnSD*rng.NormFloat64()
		wild := rng.Float64() < k.Wild
		if wild {
			v += k.WildSD * rng.NormFloat64()
		}
		g.wild = append(g.wild, wild)
		t.Preconsolidation = math.Exp(v)
	}
	for i, s := range g.in.Stations {
		g.truth = append(g.truth, line(s.Depth, s.EffectiveStress)+departure[n+i])
	}
	return g
}

// drawDeparture draws the departure at tests and stations.
func drawDeparture(rng *rand.Rand, in *Input, amplitude, length float64) []float64 {
	var z []float64
	for _, t := range in.Tests {
		z = append(z, t.Depth)
	}
	for _, s := range in.Stations {
		z = append(z, s.Depth)
	}
	c := mat.NewSymDense(len(z), nil)
	for i := range z {
		for j := i; j < len(z); j++ {
			c.SetSym(i, j, amplitude*amplitude*matern(z[i]-z[j], length))
		}
		c.SetSym(i, i, c.At(i, i)+1e-9)
	}
	var chol mat.Cholesky
	if !chol.Factorize(c) {
		panic("covariance of the departure")
	}
	var lower mat.TriDense
	chol.LTo(&lower)
	e := mat.NewVecDense(len(z), nil)
	for i := range z {
		e.SetVec(i, rng.NormFloat64())
	}
	var out mat.VecDense
	out.MulVec(&lower, e)
	return out.RawVector().Data
}

// On generated ground the bands hold what they say, the mechanism that the
// tool names is the true one, and its probabilities are frequencies. 500 sites
// with PASTLOAD_FULL=1.
func TestGeneratedGround(t *testing.T) {
	sites, slack, rightly := 150, 0.05, 0.70
	if os.Getenv("PASTLOAD_FULL") != "" {
		sites, slack, rightly = 500, 0.03, 0.80
	}
	rng := rand.New(rand.NewSource(1936))
	k := standard
	var truth, in90, in50, good, test90, test50, told, right float64
	var bins [5]struct{ n, said, was float64 }
	confusion := map[string][2]float64{}
	for range sites {
		g := generate(rng, &k)
		res, err := Infer(g.in)
		if err != nil {
			t.Fatal(err)
		}
		for i, p := range res.Points {
			truth++
			in90 += indicator(math.Log(p.Preconsolidation.Low) < g.truth[i] && g.truth[i] < math.Log(p.Preconsolidation.High))
			u := (g.truth[i] - math.Log(p.Preconsolidation.Best)) / p.LnSD
			in50 += indicator(math.Abs(u) < 0.6745)
		}
		for i, r := range res.Tests {
			if !g.wild[i] {
				good++
				test90 += indicator(math.Abs(r.Z) < 1.6449)
				test50 += indicator(math.Abs(r.Z) < 0.6745)
			}
		}
		l := res.Layers[0]
		c := confusion[g.mechanism]
		c[0]++
		if l.Distinguishable {
			told++
			c[1]++
			right += indicator(l.Mechanisms[0].Name == g.mechanism)
		}
		confusion[g.mechanism] = c
		for _, m := range l.Mechanisms {
			b := &bins[min(4, int(m.Probability*5))]
			b.n++
			b.said += m.Probability
			b.was += indicator(m.Name == g.mechanism)
		}
	}
	t.Logf("line in 90 %% band %.3f, within 0.67 sd %.3f; good tests in 90 %% band %.3f, in 50 %% band %.3f", in90/truth, in50/truth, test90/good, test50/good)
	t.Logf("told apart at %.0f of %d sites, right at %.3f of them", told, sites, right/told)
	for i, b := range bins {
		t.Logf("probability %.1f to %.1f: %4.0f cases, said %.3f, was %.3f", 0.2*float64(i), 0.2*float64(i+1), b.n, b.said/math.Max(1, b.n), b.was/math.Max(1, b.n))
	}
	for _, m := range newMechanisms() {
		t.Logf("%-40s %3.0f sites, told apart at %.0f", m.name, confusion[m.name][0], confusion[m.name][1])
	}
	for what, v := range map[string][2]float64{
		"line in the 90 % band":       {in90 / truth, 0.90},
		"good tests in the 90 % band": {test90 / good, 0.90},
		"good tests in the 50 % band": {test50 / good, 0.50},
	} {
		if math.Abs(v[0]-v[1]) > slack {
			t.Errorf("%s: %.3f, want %.2f within %.2f", what, v[0], v[1], slack)
		}
	}
	if right < rightly*told {
		t.Errorf("the mechanism is right at %.0f of %.0f sites where it is told, want %.2f", right, told, rightly)
	}
	for i, b := range bins {
		// Four standard errors of the frequency in the bin.
		if p := b.said / math.Max(1, b.n); b.n > 0 && math.Abs(b.was/b.n-p) > 4*math.Sqrt(p*(1-p)/b.n)+0.02 {
			t.Errorf("probabilities in bin %d: said %.3f, was %.3f of %.0f", i, p, b.was/b.n, b.n)
		}
	}
}

func indicator(b bool) float64 {
	if b {
		return 1
	}
	return 0
}
