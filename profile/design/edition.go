package design

import "strings"

// An Edition is the code edition whose words the output uses.
type Edition struct {
	Name   string `json:"name"`
	Term   string `json:"term"`   // what a cautious value is called
	Basis  string `json:"basis"`  // what the term stands for
	Clause string `json:"clause"` // only where the clause was read
	Mark   string `json:"mark"`
	means  bool   // mean values go into design, the margin into the factors
	second bool   // second generation: nominal where statistics have too little
}

// EditionOf returns the edition that the setting "code edition" names: it looks
// for 2004, 2024 or "second generation", and AASHTO, FHWA, LRFD or MoDOT. Anything
// else, and nothing, gives neutral words.
func EditionOf(setting string) Edition {
	s := strings.ToLower(setting)
	has := func(words ...string) bool {
		for _, w := range words {
			if strings.Contains(s, w) {
				return true
			}
		}
		return false
	}
	switch {
	case has("2024", "second gen", "2nd gen"):
		return Edition{Name: "EN 1997-1:2024", Term: "representative value", Mark: MarkMemory, second: true,
			Basis: "nominal (by judgement) or characteristic (by statistics)"}
	case has("2004", "en 1997", "eurocode", "ec7"):
		return Edition{Name: "EN 1997-1:2004", Term: "characteristic value", Clause: "2.4.5.2", Mark: MarkRead,
			Basis: "cautious estimate of the value affecting the occurrence of the limit state; with statistics, a chance of a worse governing value of not more than 5 %"}
	case has("aashto", "fhwa", "lrfd", "modot"):
		return Edition{Name: "AASHTO-style", Term: "mean value", Mark: MarkMemory, means: true,
			Basis: "mean, with its coefficient of variation stated apart, where resistance factors were calibrated to means"}
	}
	return Edition{Term: "cautious estimate", Mark: MarkChoice, Basis: "no code edition is set"}
}
