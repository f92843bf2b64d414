package correlate

// A Quantity is what a correlation estimates.
type Quantity string

// The quantities, in the order in which the catalogue lists them.
const (
	CompressionIndex         Quantity = "compression index"
	CompressionRatio         Quantity = "compression ratio"
	RecompressionIndex       Quantity = "recompression index"
	SecondaryIndex           Quantity = "secondary compression index"
	SecondaryStrain          Quantity = "secondary compression, strain"
	AgeingRatio              Quantity = "overconsolidation ratio by ageing"
	IntrinsicVoidRatio       Quantity = "intrinsic void ratio"
	VoidIndex                Quantity = "void index"
	PreconsolidationStress   Quantity = "preconsolidation stress"
	OverconsolidationRatio   Quantity = "overconsolidation ratio"
	UndrainedStrength        Quantity = "undrained strength"
	StrengthRatio            Quantity = "undrained strength ratio"
	RemouldedStrength        Quantity = "remoulded undrained strength"
	VaneCorrection           Quantity = "vane correction"
	Sensitivity              Quantity = "sensitivity"
	EarthPressureCoefficient Quantity = "earth pressure coefficient at rest"
	FrictionAngle            Quantity = "effective friction angle"
)

type quantityWords struct {
	quantity     Quantity
	symbol, unit string
}

var quantities = []quantityWords{
	{CompressionIndex, "Cc", ""},
	{CompressionRatio, "CR", ""},
	{RecompressionIndex, "Cr", ""},
	{SecondaryIndex, "Cα", ""},
	{SecondaryStrain, "Cαε", ""},
	{AgeingRatio, "OCR", ""},
	{IntrinsicVoidRatio, "e*100", ""},
	{VoidIndex, "Iv", ""},
	{PreconsolidationStress, "σ′p", "kPa"},
	{OverconsolidationRatio, "OCR", ""},
	{UndrainedStrength, "su", "kPa"},
	{StrengthRatio, "su/σ′v0", ""},
	{RemouldedStrength, "sur", "kPa"},
	{VaneCorrection, "μ", ""},
	{Sensitivity, "St", ""},
	{EarthPressureCoefficient, "K0", ""},
	{FrictionAngle, "φ′", "°"},
}

// Quantities returns every quantity of the catalogue, in its order.
func Quantities() []Quantity {
	out := make([]Quantity, len(quantities))
	for i, q := range quantities {
		out[i] = q.quantity
	}
	return out
}

// Symbol returns the quantity as the trade writes it, such as "σ′p", or "" for
// a quantity that is not in the catalogue.
func (q Quantity) Symbol() string { return q.words().symbol }

// Unit returns the unit of the quantity, "" for a pure number.
func (q Quantity) Unit() string { return q.words().unit }

func (q Quantity) words() quantityWords {
	for _, w := range quantities {
		if w.quantity == q {
			return w
		}
	}
	return quantityWords{}
}
