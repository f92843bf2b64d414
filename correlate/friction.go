package correlate

import "math"

var (
	assumedFrictionScatter = Scatter{Between: 0.10, Within: 0.07, Note: "assumed, about 3° to 4°"}
	okkelsSource           = "Sorensen & Okkels 2013, 18th Int. Conf. Soil Mech. Geotech. Eng., 423–426"
)

const (
	okkelsSoil  = "undisturbed overconsolidated Danish clay, from till to high plasticity"
	okkelsTwice = "a deliberately cautious peak angle that pairs with its own rule for c′; large scatter"
)

// frictionAngle holds the effective friction angle from the plasticity index.
var frictionAngle = []Correlation{
	{
		ID: "mitchell-1976", Name: "Mitchell (1976), after Kenney (1959)", Quantity: FrictionAngle,
		Formula: "sin φ′ = 0.8 − 0.094·ln PI",
		Inputs:  []Input{input("PI").within(5, 120, usualRange)},
		Soil:    "normally consolidated clay, constant volume", Family: "chart of Kenney", Rank: 1, Scatter: assumedFrictionScatter,
		Source: "Mitchell 1976; Kulhawy & Mayne 1990, after Kenney 1959", Verified: FromMemory,
		Cautions: []string{"the logarithm is natural: with base 10, PI 30 would give 41° and not 28.7°"},
		eval: func(v Values) float64 {
			return math.Asin(0.8-0.094*math.Log(v["PI"])) * 180 / math.Pi
		},
	},
	{
		ID: "terzaghi-peck-mesri-1996-phi", Name: "Terzaghi, Peck & Mesri (1996), fitted", Quantity: FrictionAngle,
		Formula: "φ′ = 43 − 10·log PI",
		Inputs:  []Input{input("PI").within(5, 150, usualRange)},
		Soil:    "normally consolidated clay, mean", Family: "chart of Terzaghi, Peck & Mesri", Rank: 1, Scatter: assumedFrictionScatter,
		Source: "fit to the chart of Terzaghi, Peck & Mesri 1996, quoted in Sorensen & Okkels 2013", Verified: FromMemory,
		Cautions: []string{"base 10; lower bound 39 − 11·log PI"},
		eval:     func(v Values) float64 { return 43 - 10*math.Log10(v["PI"]) },
	},
	{
		ID: "sorensen-okkels-2013-mean", Name: "Sorensen & Okkels (2013), mean", Quantity: FrictionAngle,
		Formula: "φ′ = 45 − 14·log PI to PI 50; 26 − 3·log PI to PI 150",
		Inputs:  []Input{input("PI").within(4.001, 150, publishedRange)},
		Soil:    okkelsSoil, Ground: Regional, Family: "Danish overconsolidated clay", Rank: 1, Scatter: assumedFrictionScatter,
		Source: okkelsSource, Verified: AbstractOnly, Cautions: []string{okkelsTwice, "base 10"},
		eval: func(v Values) float64 { return okkels(v["PI"], 45, 14, 26, 3) },
	},
	{
		ID: "sorensen-okkels-2013-lower", Name: "Sorensen & Okkels (2013), lower", Quantity: FrictionAngle,
		Formula: "φ′ = 44 − 14·log PI to PI 50; 30 − 6·log PI to PI 150",
		Inputs:  []Input{input("PI").within(4.001, 150, publishedRange)},
		Soil:    okkelsSoil, Ground: Regional, Family: "Danish overconsolidated clay", Rank: 2, Scatter: assumedFrictionScatter,
		Source: okkelsSource, Verified: AbstractOnly, Cautions: []string{"a lower bound by its authors", okkelsTwice, "base 10"},
		eval: func(v Values) float64 { return okkels(v["PI"], 44, 14, 30, 6) },
	},
}

// okkels is a line in log10 PI with a break at PI 50.
func okkels(pi, a, b, c, d float64) float64 {
	if pi <= 50 {
		return a - b*math.Log10(pi)
	}
	return c - d*math.Log10(pi)
}
