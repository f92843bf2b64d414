package intake

import "strings"

// A tradeName is what intake knows of a quantity beside the profile's own
// entry: its dimension, what the trade calls it, and what cannot be right.
type tradeName struct {
	dim      *dimension
	limit    limit
	synonyms string
	meaning  string
}

const unitWeightNames = "γ; gamma; γb; γt; bulk unit weight; total unit weight; moist unit weight; wet unit weight; bulk density; wet density; unit wt"

const preconsolidationNames = "σ'p; σp'; σ'pc; σ'c; σ'vm; σ'vc; Pc; Pc'; P'c; Pp; Pp'; preconsolidation pressure; preconsolidation; pre-consolidation stress; pre-consolidation pressure; yield stress; vertical yield stress; σ'y; σ'vy; σ'ym; maximum past pressure; maximum past stress; maximum past effective stress; past maximum stress; s'p; sp'"

// names returns the synonyms.
func (t tradeName) names() string { return t.synonyms }

// suffixed adds words to every preconsolidation name.
func suffixed(words ...string) string {
	var out []string
	for n := range strings.SplitSeq("preconsolidation stress;"+preconsolidationNames, ";") {
		for _, w := range words {
			out = append(out, strings.TrimSpace(n)+" "+w)
		}
	}
	return strings.Join(append(out, words[0]), ";")
}

// positive is the limit of stresses of the past: greater than zero, and at most
// what a laboratory frame can apply many times over (50 MPa).
var positive = above(0, 50_000)

// trade holds every quantity of a result by its name.
var trade = map[string]tradeName{
	"unit weight":      {unitWeight, unitWeightLimit, unitWeightNames, "bulk, as sampled"},
	"water content":    {percent, within(0, 2500), "w; w0; wn; wc; moisture content; natural water content; natural moisture content; moisture; nmc; mc", "natural water content"},
	"liquid limit":     {percent, within(0, 2000), "LL; wL", ""},
	"plastic limit":    {percent, within(0, 1000), "PL; wP", `"NP" where the soil is not plastic`},
	"plasticity index": {percent, within(0, 1500), "PI; IP", "LL − PL"},
	"liquidity index":  {ratio, within(-100, 100), "LI; IL", "(w − PL)/PI"},
	"specific gravity": {gravityRatio, within(1.05, 5.5), "Gs; SG; ρs; particle density; density of solids; solid density", "particle density over that of water"},
	"void ratio":       {ratio, above(0, 40), "e; e0; eo; initial void ratio; in situ void ratio; natural void ratio", "in the ground"},
	"clay fraction":    {percent, within(0, 100), "clay; CF; clay content; clay (<2 µm); clay size", "finer than 2 µm, by mass"},
	"organic content":  {percent, within(0, 100), "organic; organics; organic matter; organic matter content", "by mass"},
	"effective stress": {stress, positive, "σ'v0; σ'v; σ'vo; σv0'; σv'; σvo'; σ'0; p0'; po'; p'0; p'o; effective vertical stress; vertical effective stress; in situ effective stress; effective overburden stress; effective overburden pressure; effective overburden; overburden effective stress; s'v0; s'v; s'vo; sv0'; svo'", "vertical, as given by others; used where nothing else can give it"},

	"preconsolidation stress":      {stress, positive, preconsolidationNames, "vertical yield stress, as reported"},
	"preconsolidation stress low":  {stress, positive, suffixed("low", "min", "minimum", "lower"), "lower end of its range"},
	"preconsolidation stress high": {stress, positive, suffixed("high", "max", "maximum", "upper"), "upper end of its range"},

	"compression index":           {ratio, within(0, 40), "Cc", "slope per log10 cycle of stress, in void ratio"},
	"recompression index":         {ratio, within(0, 10), "Cr; reload index; reloading index", "of reloading, in void ratio"},
	"swelling index":              {ratio, within(0, 10), "Cs; swell index; rebound index; unloading index", "of unloading, in void ratio"},
	"secondary compression index": {ratio, within(0, 5), "Cα; Calpha; Cαe; Cae; secondary compression; coefficient of secondary compression", "void ratio per log10 cycle of time"},

	"undrained strength":        {stress, within(0, 10_000), "su; cu; undrained shear strength; undrained cohesion; suv", "peak, as measured"},
	"sensitivity":               {ratio, above(0, 10_000), "St", "undisturbed over remoulded strength"},
	"N60":                       {ratio, within(0, 1000), "SPT N60", "blow count at 60 % of the free-fall energy"},
	"horizontal stress index":   {ratio, within(-100, 1000), "KD; DMT KD", "of the flat dilatometer"},
	"material index":            {ratio, within(-100, 100), "ID; DMT ID", "of the flat dilatometer"},
	"shear wave velocity":       {velocity, above(0, 6000), "Vs; shear velocity; s-wave velocity", ""},
	"net cone resistance":       {stress, within(-10_000, 200_000), "qnet; qn; qt,net; qt-σv0; qt-σvo", "qt − σv0"},
	"excess cone pore pressure": {stress, within(-10_000, 50_000), "u2-u0; Δu; Δu2; excess pore pressure; excess pore pressure u2", "u2 − u0"},
	"effective cone resistance": {stress, within(-10_000, 200_000), "qt-u2; qE; effective tip resistance", "qt − u2"},
}
