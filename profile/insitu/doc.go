// Package insitu computes the vertical stress in level ground at rest: total
// stress σv0, pore pressure u0 and effective stress σ′v0 = σv0 − u0.
//
//	s, err := insitu.New(insitu.Column{
//		Layers: []insitu.Layer{
//			{Top: 0, Base: 5, UnitWeight: 17, SaturatedUnitWeight: 20},
//			{Top: 5, Base: 9, UnitWeight: 19, SaturatedUnitWeight: 19},
//		},
//		HasWater: true, WaterTable: 3, WaterUnitWeight: 9.81,
//	})
//	state, err := s.At(7) // state.Total, state.Pore, state.Effective
//
// Units are m, kPa and kN/m³. Depth is measured downwards from ground level, or
// from the bed where water stands above it. Compression is positive; a negative
// pore pressure is a suction.
//
// # Total stress
//
//	σv0(z) = q + γw·hw + Σ γ·Δz
//
// with q a wide surcharge and hw the height of water above ground. A layer
// weighs its SaturatedUnitWeight where u0 > 0 and in the capillary fringe, and
// its UnitWeight everywhere else, so that it is split where the water says so
// and not where the log does. In a perched profile the stretch that has drained
// to u0 ≤ 0 again weighs its UnitWeight. The sum is exact: every stretch of
// constant weight is one product.
//
// # Pore pressure
//
// With a water table and no measured points u0 = γw·(z − zw) below the table and
// 0 above it. Measured points replace this: u0 runs straight from point to point
// (steady vertical flow through uniform ground, as the textbooks take artesian
// and under-drained clay), the water table being one of the points with u0 = 0.
//
//   - Below the last point u0 grows by γw per metre. Ground that is dry below a
//     perched table therefore needs two zeros: the base of the perched water and
//     the depth down to which the ground is known to be dry.
//   - Above the first point, if its pressure is positive, u0 falls by γw per
//     metre to 0 and stays there; if it would still be positive at ground
//     level, u0 runs straight from 0 at ground level to the point.
//   - Above the first point, if it is a suction, u0 runs straight to 0 at ground
//     level: no more suction is counted than was measured.
//   - Capillary rise h above the table gives u0 = −γw·(zw − z) in the fringe and
//     0 above, so u0 and σ′v0 step at the top of the fringe. Full saturation of
//     the fringe is assumed (u0 = −γw·h, not −S·γw·h). Where the nearest
//     measured point above the table is not 0, or lies in the fringe, the
//     straight line from it to the table rules and the fringe only counts as
//     saturated ground.
//   - Without a water table the measured points imply one where they can: the
//     depth at which u0 becomes positive for the first time.
//
// A depth on a boundary or on a step belongs to what lies below it; JustAbove
// gives the other side.
//
// # Tolerance
//
// Logs are rounded, so depths that differ by up to 1 mm are taken as the same
// where layers meet, where points coincide and at the two ends of the column.
// A lower layer that starts up to 1 mm off begins at the base of the upper one.
//
// # What is not done here
//
// σ′v0 ≤ 0 is returned as computed. It means that ground or input is at its limit
// (a base about to heave, a wrong gauge level), and is for the caller to report.
// A saturated unit weight below that of water is accepted (some peats float).
// A surcharge is taken as fully consolidated: to leave it out of σ′v0, add it to
// the measured pore pressures.
//
// # References
//
// Terzaghi, K. (1943). Theoretical Soil Mechanics. Wiley. (principle of effective
// stress; from memory, unverified)
//
// The sources of the worked examples are named in Published.
package insitu
