package review

import "slices"

// A Rule is one check. Its tolerances are ours where Source does not say
// otherwise; Mark says how far the source was verified.
type Rule struct {
	ID        string
	Name      string
	Formula   string
	Tolerance string
	Source    string
	Mark      string
	Severity  Severity // the heaviest that it can reach
	Causes    []string // the usual ones, the most likely first
	Action    string   // the next step

	relation *relation                // a check of one row, which the diagnosis weighs with the others
	check    func(*context) []Finding // a check of its own
}

// Reference returns the source with its mark.
func (r *Rule) Reference() string { return r.Source + " [" + r.Mark + "]" }

// The marks of a source.
const (
	definition = "identity, exact"
	memory     = "from memory, unverified"
	practice   = "common practice"
	project    = "project definition"
	measured   = "tolerance by error propagation"
)

// Rules lists every rule in the order of work: units and limits of one result
// first, then phase relations and stress, then the adequacy of each test, then
// the borehole around it.
func Rules() []Rule { return slices.Clone(rules) }

// rules is filled from one list for each subject.
var rules = slices.Concat(rangeRules, limitRules, phaseRules, indexRules, stratumRules, stressRules, voidIndexRules, strengthRules, curveRules, placeRules, boreholeRules, siteRules)

// ruleByID finds a rule of our own lists.
func ruleByID(id string) *Rule {
	for i := range rules {
		if rules[i].ID == id {
			return &rules[i]
		}
	}
	panic("review: no rule " + id)
}
