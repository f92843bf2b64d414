package intake

import (
	"fmt"
	"slices"
	"strings"

	"golang.org/x/text/unicode/norm"
)

// key folds the spellings of a name: case, blanks, punctuation, Greek letters,
// subscripts and the several primes. Two names are the same if their keys are.
func key(s string) string {
	s = strings.Map(func(r rune) rune {
		switch r {
		case '’', '‘', '′', '`', '´', 'ʹ':
			return '\''
		}
		return r
	}, s)
	var b strings.Builder
	for _, r := range strings.ToLower(norm.NFKC.String(s)) {
		switch r {
		case 'σ', 'ς':
			b.WriteString("sigma")
		case 'γ':
			b.WriteString("gamma")
		case 'α':
			b.WriteString("alpha")
		case 'ε':
			b.WriteString("epsilon")
		case 'ρ':
			b.WriteString("rho")
		case 'δ', '∆':
			b.WriteString("delta")
		case '\'':
			b.WriteByte('\'')
		default:
			if r >= 'a' && r <= 'z' || r >= '0' && r <= '9' || r > 0x7f && !strings.ContainsRune("−–—·•", r) {
				b.WriteRune(r)
			}
		}
	}
	return b.String()
}

// A split is one way to part a header into name and unit.
type split struct {
	name, unit string
	sure       bool // brackets: what stands in them is the unit
}

// splits returns the ways to part a header, the likeliest first.
func splits(header string) []split {
	h := clean(header)
	var out []split
	if n := len(h); n > 2 && (h[n-1] == ')' || h[n-1] == ']') {
		open := "("
		if h[n-1] == ']' {
			open = "["
		}
		if i := strings.LastIndex(h, open); i > 0 {
			out = append(out, split{h[:i], strings.TrimSpace(h[i+1 : n-1]), true})
		}
	}
	if i := strings.LastIndexByte(h, ','); i > 0 && i+1 < len(h) {
		out = append(out, split{h[:i], strings.TrimSpace(h[i+1:]), false})
	}
	if name, ok := strings.CutSuffix(h, "%"); ok {
		out = append(out, split{name, "%", false})
	}
	if name, ok := strings.CutPrefix(h, "%"); ok {
		out = append(out, split{name, "%", false})
	}
	parts := strings.Split(h, "_")
	for i := 1; i < len(parts); i++ {
		out = append(out, split{strings.Join(parts[:i], "_"), strings.Join(parts[i:], "/"), false})
	}
	if i := strings.LastIndexByte(h, ' '); i > 0 {
		out = append(out, split{h[:i], strings.TrimSpace(h[i+1:]), false})
	}
	return out
}

// A vocabulary finds a column by any of its names.
type vocabulary map[string]int

func newVocabulary(specs []spec) vocabulary {
	v := vocabulary{}
	for i, s := range specs {
		for _, name := range s.names() {
			k := key(name)
			if j, ok := v[k]; ok && j != i {
				panic(fmt.Sprintf("intake: %q is a name of both %q and %q", name, specs[j].name, s.name))
			}
			v[k] = i
		}
	}
	return v
}

// A field is one field of a header: the column it is bound to, and its unit.
type field struct {
	header   string
	spec     int // -1 where no column has that name
	unit     unit
	unitText string // as typed; "" where the header names none
	known    bool   // the unit is known
	place    int    // 1 is the first
}

// bindField parts a header into a known name and a unit.
func (v vocabulary) bindField(header string, place int) field {
	f := field{header: clean(header), spec: -1, place: place}
	whole, isName := v[key(f.header)]
	for _, s := range splits(f.header) {
		i, ok := v[key(s.name)]
		if !ok {
			continue
		}
		// Without brackets the last word is a unit only if we know it as one:
		// "w_p" is a name, "w_pct" a name and a unit.
		if !s.sure {
			if _, ok := unitElsewhere(s.unit); !ok {
				continue
			}
		}
		if s.sure && isName && key(s.name) != key(f.header) {
			break // "clay (<2 µm)" is a name as a whole
		}
		f.spec, f.unitText = i, s.unit
		return f
	}
	if isName {
		f.spec = whole
	}
	return f
}

// near returns up to three names close to what was typed, the nearest first.
func near(typed string, names []string) []string {
	k := key(typed)
	type scored struct {
		name     string
		distance int
	}
	var found []scored
	for _, n := range names {
		d := distance(k, key(n))
		if d <= max(1, min(len(k)+1, 9)/3) {
			found = append(found, scored{n, d})
		}
	}
	slices.SortStableFunc(found, func(a, b scored) int { return a.distance - b.distance })
	var out []string
	for _, f := range found {
		if !slices.Contains(out, f.name) && len(out) < 3 {
			out = append(out, f.name)
		}
	}
	return out
}

// distance is the Levenshtein distance (Levenshtein 1966): how many insertions,
// deletions and replacements turn one text into the other.
func distance(a, b string) int {
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := 1; i <= len(a); i++ {
		last := row[0]
		row[0] = i
		for j := 1; j <= len(b); j++ {
			cost := last
			if a[i-1] != b[j-1] {
				cost++
			}
			last = row[j]
			row[j] = min(cost, row[j]+1, row[j-1]+1)
		}
	}
	return row[len(b)]
}

// quoted joins names for a message: "a", "b" or "c".
func quoted(names []string) string {
	q := make([]string, len(names))
	for i, n := range names {
		q[i] = `"` + n + `"`
	}
	if len(q) < 2 {
		return strings.Join(q, "")
	}
	return strings.Join(q[:len(q)-1], ", ") + " or " + q[len(q)-1]
}
