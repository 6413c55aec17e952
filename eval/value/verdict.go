package value

import (
	"fmt"

	"adjoin/algebra"
	"adjoin/eval/display"
)

// Verdict is the answer to a yes-or-no question with its evidence.
type Verdict struct {
	algebra.Verdict
	Plain bool          // the evidence goes without saying, as for 1 = 1, and is shown on request only
	Claim func() string // what was asked, as an expression; may be nil
}

// Certificate shows the evidence of a verdict in full.
type Certificate struct{ Of Verdict }

func (Verdict) Kind() string     { return "a truth value" }
func (Certificate) Kind() string { return "a certificate" }

func (v Verdict) Text(*Printer) string { return fmt.Sprint(v.Holds) }
func (v Verdict) TeX(*Printer) string  { return fmt.Sprintf(`\text{%t}`, v.Holds) }

func (v Certificate) Text(p *Printer) string {
	if v.Of.Claim != nil {
		return "certificate of (" + v.Of.Claim() + ")"
	}
	return "certificate of (" + v.Of.Text(p) + ")"
}

func (v Verdict) Document(*Printer) display.Document {
	if v.Plain {
		return display.Text{Text: fmt.Sprint(v.Holds)}
	}
	return display.Verdict{Text: fmt.Sprint(v.Holds), Evidence: v.Evidence}
}

func (v Certificate) Document(*Printer) display.Document {
	return display.Verdict{Text: fmt.Sprint(v.Of.Holds), Evidence: v.Of.Evidence}.Table()
}

func (v Verdict) Canonical() (string, map[string]any) {
	return "verdict", evidence(v.Verdict)
}

func (v Certificate) Canonical() (string, map[string]any) {
	return "certificate", evidence(v.Of.Verdict)
}

func evidence(v algebra.Verdict) map[string]any {
	witness := make([]any, len(v.Evidence.Witness))
	for i, f := range v.Evidence.Witness {
		witness[i] = map[string]any{"name": f.Name, "value": fmt.Sprint(f.Value)}
	}
	return map[string]any{
		"holds": v.Holds, "standing": v.Evidence.Standing.String(), "reason": v.Evidence.Reason,
		"witness": witness, "source": v.Evidence.Source,
	}
}

// Not is the opposite verdict on the same evidence.
func Not(v algebra.Verdict) algebra.Verdict {
	v.Holds = !v.Holds
	return v
}

// And holds when both do. A false part alone settles it.
func And(a, b algebra.Verdict) algebra.Verdict {
	switch {
	case !a.Holds:
		return a
	case !b.Holds:
		return b
	}
	return algebra.Verdict{Holds: true, Evidence: both(a.Evidence, b.Evidence)}
}

// Or holds when one does. A true part alone settles it.
func Or(a, b algebra.Verdict) algebra.Verdict {
	switch {
	case a.Holds:
		return a
	case b.Holds:
		return b
	}
	return algebra.Verdict{Evidence: both(a.Evidence, b.Evidence)}
}

func both(a, b algebra.Evidence) algebra.Evidence {
	e := algebra.Evidence{
		Standing: algebra.Weakest(a.Standing, b.Standing), Reason: a.Reason, Source: a.Source,
		Witness: append(a.Witness[:len(a.Witness):len(a.Witness)], b.Witness...),
	}
	if b.Reason != a.Reason && b.Reason != "" {
		if e.Reason != "" {
			e.Reason += "; "
		}
		e.Reason += b.Reason
	}
	if b.Source != a.Source && b.Source != "" {
		if e.Source != "" {
			e.Source += "; "
		}
		e.Source += b.Source
	}
	return e
}
