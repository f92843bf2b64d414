// Package design turns the results of an investigation into values per stratum:
// what was measured, how it scatters, whether it changes with depth, and how
// low or high a cautious reader would take it by each published way.
//
//	strata, err := design.Values(p)                             // across boreholes
//	strata, err = design.Options{PerBorehole: true}.Values(p)   // and one by one
//	for _, v := range strata[0].Parameters { … v.Low, v.High, v.Method … }
//	line := design.Line(p.Boreholes[0], strata)                 // σ′p with depth for a settlement calculation
//
// Three things are kept apart. The summary (n, least, greatest, mean, median,
// SD, COV) is of values that were measured, or derived from measured ones, as
// Origin says. Low and High are what a formula makes of them; they are an aid
// to judgement, not a decision. Adopted is the engineer's own value, with the
// engineer's reason: it is never computed here.
//
// Depth grows downwards from ground level. Units are m, kPa, kN/m³ and percent
// for w, LL, PL and PI; indices and ratios are pure numbers. SD is the sample
// standard deviation (n − 1) and COV is SD over mean.
//
// A way carries a mark: how far its formula was checked against its source.
// Quantities that are positive and skewed (σ′p, OCR, Cc, Cr, Cs, CR, RR, Cα,
// su/σ′p, cv, k) are worked in natural logarithms and turned back, so the
// "mean" of their cautious estimate is the median of a log-normal quantity,
// which lies below its arithmetic mean.
//
// # References
//
//   - EN 1997-1:2004, 2.4.5.2, and EN 1997-2:2007, 5.9.2 and Annex Q.
//   - EN 1997-1:2024, Annex A: form of the formula only, from memory, unverified.
//   - Frank, R. et al. (2004). Designers' Guide to EN 1997-1. Thomas Telford.
//   - Bond, A. J. and Harris, A. (2008). Decoding Eurocode 7. Taylor & Francis.
//   - Bond, A. J. (2011). A procedure for determining the characteristic value of
//     a geotechnical parameter. Proc. 3rd Int. Symp. on Geotechnical Safety and Risk.
//   - Schneider, H. R. (1997). Definition and determination of characteristic soil
//     properties. Proc. 14th ICSMFE, Hamburg (from memory, unverified).
//   - Vanmarcke, E. H. (1977). Probabilistic modeling of soil profiles. J. Geotech.
//     Eng. Div. ASCE 103, 1227–1246.
//   - Phoon, K.-K. and Kulhawy, F. H. (1999). Characterization of geotechnical
//     variability. Can. Geotech. J. 36, 612–624 (tables from memory, unverified).
//   - Duncan, J. M. (2000). Factors of safety and reliability in geotechnical
//     engineering. J. Geotech. Geoenviron. Eng. 126, 307–316.
//   - Grubbs, F. E. (1969). Procedures for detecting outlying observations in
//     samples. Technometrics 11, 1–21.
//   - Iglewicz, B. and Hoaglin, D. C. (1993). How to detect and handle outliers. ASQC.
//   - Theil, H. (1950) and Sen, P. K. (1968). J. Am. Stat. Assoc. 63, 1379–1389.
package design
