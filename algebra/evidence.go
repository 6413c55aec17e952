package algebra

import "fmt"

// Standing says how well an answer is known. The order matters: a chain of
// answers is as good as its weakest link.
type Standing int

const (
	// Proved: a theorem and a finite computation settle it.
	Proved Standing = iota
	// Exhausted: every case was checked.
	Exhausted
	// Probable: a test that errs with small probability said so.
	Probable
	// Assumed: somebody said so and nothing here checked it.
	Assumed
)

func (s Standing) String() string {
	switch s {
	case Proved:
		return "proved"
	case Exhausted:
		return "checked exhaustively"
	case Probable:
		return "probable"
	case Assumed:
		return "assumed"
	}
	return "unknown"
}

// Fact is one named piece of a witness, such as {"factor", "x^2 + x + 1"} or
// {"x^(2^4) mod f", "x"}. Value prints with %v.
type Fact struct {
	Name  string
	Value any
}

// Evidence is why an answer is true: its standing, one line of reason that a
// colleague would accept, the facts that let them check it, and the published
// source of the criterion.
type Evidence struct {
	Standing Standing
	Reason   string
	Witness  []Fact
	Source   string
}

// With returns a copy of e with one more fact.
func (e Evidence) With(name string, value any) Evidence {
	e.Witness = append(e.Witness[:len(e.Witness):len(e.Witness)], Fact{name, value})
	return e
}

// Weakest returns the weaker of two standings.
func Weakest(a, b Standing) Standing { return max(a, b) }

// Verdict is the answer to a yes-or-no question together with its evidence.
type Verdict struct {
	Holds    bool
	Evidence Evidence
}

// Because makes a proved verdict with the given reason.
func Because(holds bool, format string, args ...any) Verdict {
	return Verdict{holds, Evidence{Standing: Proved, Reason: fmt.Sprintf(format, args...)}}
}
