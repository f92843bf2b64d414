package profile

// A Zone names how hard the ground was pressed in the past compared with today.
type Zone string

// The zones, from low to high overconsolidation ratio.
const (
	Underconsolidated       Zone = "underconsolidated (suspected)"
	NormallyConsolidated    Zone = "normally consolidated"
	LightlyOverconsolidated Zone = "lightly overconsolidated"
	HeavilyOverconsolidated Zone = "heavily overconsolidated"
)

// Zones lists the zones from low to high overconsolidation ratio.
var Zones = []Zone{Underconsolidated, NormallyConsolidated, LightlyOverconsolidated, HeavilyOverconsolidated}

// Zone returns the zone of an overconsolidation ratio. A limit belongs to the
// zone above it.
func (l Limits) Zone(ocr float64) Zone {
	switch {
	case ocr < l.NormallyConsolidated:
		return Underconsolidated
	case ocr < l.LightlyOverconsolidated:
		return NormallyConsolidated
	case ocr < l.HeavilyOverconsolidated:
		return LightlyOverconsolidated
	default:
		return HeavilyOverconsolidated
	}
}

// Meaning returns one sentence on what the zone means for design.
func (z Zone) Meaning() string {
	switch z {
	case Underconsolidated:
		return "Still settling under its own weight, or the specimens or the water level are wrong: confirm the pore pressure before any use."
	case NormallyConsolidated:
		return "Any added load goes straight to virgin compression: expect large, slow settlement and creep."
	case LightlyOverconsolidated:
		return "Stiff up to the preconsolidation stress and soft beyond it: compare the final stress with σ′p at every depth."
	case HeavilyOverconsolidated:
		return "Stiff under added load; high horizontal stress, swelling on unloading, and short-term strength that may not last."
	}
	return ""
}
