package history

import (
	"math"
	"math/rand"
	"sort"
)

// blunders is what happened when tests were falsified.
type blunders struct {
	hit, miss [][4]float64 // of falsified and untouched tests: wild probability and |z|
}

// falsify multiplies or divides tests of every site by a factor, one or
// two at a time, and collects what is made of them.
func falsify(sites []claySite, k *constants, factor float64, wrong, repetitions int) blunders {
	rng := rand.New(rand.NewSource(7490))
	var out blunders
	for _, s := range sites {
		n := len(s.in.Tests)
		if wrong == 2 && n < 10 {
			continue
		}
		for range repetitions {
			in := s.in
			in.Tests = append([]Test(nil), in.Tests...)
			chosen := rng.Perm(n)[:wrong]
			sort.Ints(chosen)
			for _, i := range chosen {
				if rng.Intn(2) == 0 {
					in.Tests[i].Preconsolidation *= factor
				} else {
					in.Tests[i].Preconsolidation /= factor
				}
			}
			res, err := infer(in, k)
			if err != nil {
				panic(err)
			}
			for i, t := range res.Tests {
				score := [4]float64{t.Wild, math.Abs(t.Z), math.Log(in.Tests[i].Preconsolidation / t.Expected.Best), math.Log(t.Expected.High/t.Expected.Low) / 3.29}
				j := sort.SearchInts(chosen, i)
				if j < wrong && chosen[j] == i {
					out.hit = append(out.hit, score)
				} else {
					out.miss = append(out.miss, score)
				}
			}
		}
	}
	return out
}

// share returns the part of the scores that a rule takes.
func share(scores [][4]float64, rule func([4]float64) bool) float64 {
	n := 0
	for _, s := range scores {
		if rule(s) {
			n++
		}
	}
	return float64(n) / math.Max(1, float64(len(scores)))
}
