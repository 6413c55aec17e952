package eval

import (
	"bytes"
	"errors"
	"regexp"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/eval/value"
	"adjoin/lang"
)

// at places an error that has no place yet.
func at(s lang.Span, err error) error {
	var f *fault
	if errors.As(err, &f) {
		return err
	}
	return asFault(err, s)
}

// asFault describes any error in the language of the trade.
func asFault(err error, s lang.Span) *fault {
	var f *fault
	if errors.As(err, &f) {
		return f
	}
	var t *told
	if errors.As(err, &t) {
		return &fault{at: s, name: t.name, reason: t.reason, remedy: t.remedy}
	}
	var reducible *field.ReducibleError
	if errors.As(err, &reducible) {
		reason, remedy := value.Reducible(reducible, nil)
		return &fault{at: s, name: "ReducibleModulus", reason: reason, remedy: remedy}
	}
	var e *algebra.Error
	if errors.As(err, &e) {
		return &fault{at: s, name: kindNames[e.Kind], reason: e.Reason, remedy: e.Remedy}
	}
	return &fault{at: s, name: nameDefect, reason: "a defect in Adjoin, not in the cell: " + err.Error(),
		remedy: "the session is intact; please report this line together with the cell"}
}

// uprooted takes the place from an error that happened in the body of a
// function: the reader sees the place of the call.
func uprooted(err error) error {
	var f *fault
	if !errors.As(err, &f) {
		return err
	}
	return &told{f.name, f.reason, f.remedy}
}

// told is a fault without a place.
type told struct{ name, reason, remedy string }

func (t *told) Error() string { return t.reason }

// blame is a fault of the given expression.
func blame(x lang.Node, kind algebra.Kind, format string, args ...any) error {
	return at(x.Span(), algebra.Errorf(kind, format, args...))
}

func syntax(e *lang.Error) *fault {
	return &fault{at: e.At, name: nameSyntax, reason: e.Reason, remedy: e.Remedy}
}

var frame = regexp.MustCompile(`(?m)^(adjoin/.*)\([^()]*\)$`)

// culprit is the innermost function of ours in the trace of a panic.
func culprit(trace []byte) string {
	if i := bytes.LastIndex(trace, []byte("\npanic(")); i >= 0 {
		trace = trace[i:]
	}
	if m := frame.FindSubmatch(trace); m != nil {
		return string(m[1])
	}
	return "the runtime"
}
