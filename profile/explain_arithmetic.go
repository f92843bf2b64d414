package profile

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"
)

// errArithmetic is wrapped by the errors of Arithmetic.
var errArithmetic = errors.New("not plain arithmetic")

// Arithmetic returns what a line of printed arithmetic gives: numbers with
// + − × · / ^ and brackets, ², ³, √( ), ln( ), log( ) of base 10, exp( ).
//
// It is how the steps of an Explanation are held to what they print. The error
// says where the line is not arithmetic or has no finite value.
func Arithmetic(text string) (float64, error) {
	a := arithmetic{rest: text}
	v := a.sum()
	a.blanks()
	if a.err == nil && a.rest != "" {
		a.fail()
	}
	if a.err == nil && !finite(v) {
		return 0, fmt.Errorf("%w: %q has no finite value", errArithmetic, text)
	}
	return v, a.err
}

// An arithmetic reads a line from left to right.
type arithmetic struct {
	rest  string
	depth int
	err   error
}

// deepest is how far brackets may be nested.
const deepest = 50

func (a *arithmetic) fail() {
	if a.err == nil {
		a.err = fmt.Errorf("%w at %q", errArithmetic, a.rest)
	}
}

func (a *arithmetic) blanks() { a.rest = strings.TrimLeft(a.rest, " ") }

// take reads one of the signs, and returns it, or "".
func (a *arithmetic) take(signs ...string) string {
	a.blanks()
	for _, s := range signs {
		if strings.HasPrefix(a.rest, s) {
			a.rest = a.rest[len(s):]
			return s
		}
	}
	return ""
}

func (a *arithmetic) sum() float64 {
	v := a.product()
	for a.err == nil {
		switch a.take("+", "−", "-") {
		case "+":
			v += a.product()
		case "−", "-":
			v -= a.product()
		default:
			return v
		}
	}
	return v
}

func (a *arithmetic) product() float64 {
	v := a.signed()
	for a.err == nil {
		switch a.take("×", "·", "/") {
		case "×", "·":
			v *= a.signed()
		case "/":
			v /= a.signed()
		default:
			return v
		}
	}
	return v
}

func (a *arithmetic) signed() float64 {
	if a.take("−", "-") != "" {
		return -a.signed()
	}
	return a.power()
}

func (a *arithmetic) power() float64 {
	v := a.value()
	for a.err == nil {
		switch a.take("^", "²", "³") {
		case "^":
			v = math.Pow(v, a.exponent())
		case "²":
			v *= v
		case "³":
			v = v * v * v
		default:
			return v
		}
	}
	return v
}

// exponent reads what is raised to: a number with its sign, or brackets.
func (a *arithmetic) exponent() float64 {
	if a.take("−", "-") != "" {
		return -a.value()
	}
	return a.value()
}

func (a *arithmetic) value() float64 {
	switch a.take("(", "[", "√", "exp", "ln", "log") {
	case "(":
		return a.bracket(")")
	case "[":
		return a.bracket("]")
	case "√":
		return math.Sqrt(a.value())
	case "exp":
		return math.Exp(a.value())
	case "ln":
		return math.Log(a.value())
	case "log":
		return math.Log10(a.value())
	}
	return a.number()
}

func (a *arithmetic) bracket(end string) float64 {
	if a.depth++; a.depth > deepest {
		a.fail()
		return 0
	}
	v := a.sum()
	a.depth--
	if a.err == nil && a.take(end) == "" {
		a.fail()
	}
	return v
}

func (a *arithmetic) number() float64 {
	a.blanks()
	n := strings.IndexFunc(a.rest, func(r rune) bool { return r >= utf8.RuneSelf || r != '.' && (r < '0' || r > '9') })
	if n < 0 {
		n = len(a.rest)
	}
	v, err := strconv.ParseFloat(a.rest[:n], 64)
	if err != nil {
		a.fail()
		return 0
	}
	a.rest = a.rest[n:]
	return v
}
