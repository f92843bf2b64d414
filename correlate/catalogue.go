package correlate

import "slices"

// catalogue is every entry, in the order in which it is listed. A new section
// is one line here.
var catalogue = slices.Concat(
	compressionFromLiquidLimit,
	compressionFromVoidRatio,
	compressionAzzouz,
	compressionReconstituted,
	compressionOrganic,
	compressionRatio,
	recompression,
	secondary,
	intrinsic,
	yieldFromIndex,
	yieldFromCone,
	ratioFromCone,
	yieldFromVane,
	yieldFromDilatometer,
	yieldFromOther,
	strength,
	vaneCorrection,
	sensitivity,
	atRest,
	frictionAngle,
)
