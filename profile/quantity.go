package profile

// A Quantity is one of the numbers that a Result can carry. The list is what
// reading, checking, statistics and output share: none keeps a list of its own.
type Quantity struct {
	Name   string // the column name, e.g. "water content"
	Symbol string // as the trade writes it, e.g. "w"
	Unit   string // the unit inside: kPa, kN/m3, m, m/s, % or "" for a pure number
	Key    string // for output columns and JSON, ends in the unit: "water_content_pct"
	Of     func(*Result) *Number
}

// Quantities lists every quantity of a Result in the order of the results table.
var Quantities = []Quantity{
	{"unit weight", "γ", "kN/m3", "unit_weight_kN_m3", func(r *Result) *Number { return &r.UnitWeight }},
	{"water content", "w", "%", "water_content_pct", func(r *Result) *Number { return &r.WaterContent }},
	{"liquid limit", "LL", "%", "liquid_limit_pct", func(r *Result) *Number { return &r.LiquidLimit }},
	{"plastic limit", "PL", "%", "plastic_limit_pct", func(r *Result) *Number { return &r.PlasticLimit }},
	{"plasticity index", "PI", "%", "plasticity_index_pct", func(r *Result) *Number { return &r.PlasticityIndex }},
	{"liquidity index", "LI", "", "liquidity_index", func(r *Result) *Number { return &r.LiquidityIndex }},
	{"specific gravity", "Gs", "", "specific_gravity", func(r *Result) *Number { return &r.SpecificGravity }},
	{"void ratio", "e0", "", "void_ratio", func(r *Result) *Number { return &r.VoidRatio }},
	{"clay fraction", "clay", "%", "clay_fraction_pct", func(r *Result) *Number { return &r.ClayFraction }},
	{"organic content", "organic", "%", "organic_content_pct", func(r *Result) *Number { return &r.OrganicContent }},
	{"effective stress", "σ′v0", "kPa", "effective_stress_kPa", func(r *Result) *Number { return &r.EffectiveStress }},
	{"preconsolidation stress", "σ′p", "kPa", "preconsolidation_stress_kPa", func(r *Result) *Number { return &r.Preconsolidation }},
	{"preconsolidation stress low", "σ′p low", "kPa", "preconsolidation_stress_low_kPa", func(r *Result) *Number { return &r.PreconsolidationLow }},
	{"preconsolidation stress high", "σ′p high", "kPa", "preconsolidation_stress_high_kPa", func(r *Result) *Number { return &r.PreconsolidationHigh }},
	{"compression index", "Cc", "", "compression_index", func(r *Result) *Number { return &r.CompressionIndex }},
	{"recompression index", "Cr", "", "recompression_index", func(r *Result) *Number { return &r.RecompressionIndex }},
	{"swelling index", "Cs", "", "swelling_index", func(r *Result) *Number { return &r.SwellingIndex }},
	{"secondary compression index", "Cα", "", "secondary_compression_index", func(r *Result) *Number { return &r.SecondaryCompression }},
	{"undrained strength", "su", "kPa", "undrained_strength_kPa", func(r *Result) *Number { return &r.UndrainedStrength }},
	{"sensitivity", "St", "", "sensitivity", func(r *Result) *Number { return &r.Sensitivity }},
	{"N60", "N60", "", "n60", func(r *Result) *Number { return &r.N60 }},
	{"horizontal stress index", "KD", "", "horizontal_stress_index", func(r *Result) *Number { return &r.HorizontalStressIndex }},
	{"material index", "ID", "", "material_index", func(r *Result) *Number { return &r.MaterialIndex }},
	{"shear wave velocity", "Vs", "m/s", "shear_wave_velocity_m_s", func(r *Result) *Number { return &r.ShearWaveVelocity }},
	{"net cone resistance", "qt − σv0", "kPa", "net_cone_resistance_kPa", func(r *Result) *Number { return &r.NetConeResistance }},
	{"excess cone pore pressure", "u2 − u0", "kPa", "excess_cone_pore_pressure_kPa", func(r *Result) *Number { return &r.ExcessConePressure }},
	{"effective cone resistance", "qt − u2", "kPa", "effective_cone_resistance_kPa", func(r *Result) *Number { return &r.EffectiveCone }},
}
