package algebra

import "fmt"

// Kind says what sort of failure an Error is. Callers branch on the kind and
// show the text.
type Kind int

const (
	// Undefined: mathematics gives no answer, as for 1/0.
	Undefined Kind = iota + 1
	// Unable: there may be an answer, but no method here reaches it. It never
	// means "no".
	Unable
	// TooLarge: the result or the work would pass a limit.
	TooLarge
	// Mismatch: the operands come from structures that do not combine.
	Mismatch
	// Invalid: an argument is not what the operation is about, such as a
	// reducible modulus for a field.
	Invalid
	// Interrupted: the user or the budget stopped the computation.
	Interrupted
)

func (k Kind) String() string {
	switch k {
	case Undefined:
		return "undefined"
	case Unable:
		return "unable"
	case TooLarge:
		return "too large"
	case Mismatch:
		return "mismatch"
	case Invalid:
		return "invalid"
	case Interrupted:
		return "interrupted"
	}
	return "unknown"
}

// Error is a failure told in the language of the trade: Reason says what is
// wrong, Remedy (possibly empty) the way out. Both are plain text without a
// closing full stop.
type Error struct {
	Kind   Kind
	Reason string
	Remedy string
}

// Errorf returns an Error of the given kind without a remedy.
func Errorf(kind Kind, format string, args ...any) *Error {
	return &Error{Kind: kind, Reason: fmt.Sprintf(format, args...)}
}

// WithRemedy returns a copy of e that also says the way out.
func (e *Error) WithRemedy(format string, args ...any) *Error {
	c := *e
	c.Remedy = fmt.Sprintf(format, args...)
	return &c
}

func (e *Error) Error() string {
	if e.Remedy == "" {
		return e.Reason
	}
	return e.Reason + "; " + e.Remedy
}
