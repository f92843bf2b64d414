package oedometer

// dissipated is the dissipated strain energy construction of Wang & Frost (2004):
// the elastic work β·σ′, with β = dW/dσ′ on the reload limb of a loop, is taken
// off the total work, and the line of the post-yield points is produced to zero
// dissipation. Disturbed recompression drops out. It needs a loop.
func dissipated(in *input) outcome {
	if in.beta <= 0 {
		return refused("needs an unload–reload loop")
	}
	p := in.twoLines(in.s, in.work, in.estimate, in.virgin, func(s float64) float64 { return s })
	if !p.ok {
		return refused("no straight line past yield in work against stress")
	}
	elastic := straight{0, in.beta}
	at, ok := elastic.meet(p.two)
	if !ok || at <= 0 || p.two.slope <= in.beta || at > in.last() {
		return refused("the post-yield line does not reach zero dissipation")
	}
	out := outcome{stress: at, ok: true, weak: p.weak}
	if in.detail {
		end := in.s[p.twoLast]
		out.lines = []DrawnLine{
			{"elastic work", WorkPlane, 0, 0, at, elastic.at(at)},
			{"post-yield line", WorkPlane, at, p.two.at(at), end, p.two.at(end)},
		}
		for i := p.twoFirst; i <= p.twoLast; i++ {
			out.points = append(out.points, i)
		}
	}
	return out
}
