package display

import (
	"fmt"
	"strings"

	"adjoin/algebra"
)

// Verdict is an answer with its evidence shown small beside it.
type Verdict struct {
	Text     string // the answer: true or false
	Evidence algebra.Evidence
}

// reason is the standing and the reason on one line.
func (v Verdict) reason() string {
	if v.Evidence.Reason == "" {
		return v.Evidence.Standing.String()
	}
	return v.Evidence.Standing.String() + ": " + oneLine(v.Evidence.Reason)
}

// Bundle has the answer and the line of evidence in each form.
func (v Verdict) Bundle() Bundle {
	return Bundle{Data: map[string]any{
		MIMEText:  v.Text + "  # " + v.reason(),
		MIMEHTML:  v.HTML(),
		MIMELaTeX: v.LaTeX(),
	}}
}

// HTML is the answer with the evidence in small print.
func (v Verdict) HTML() string {
	return "<div>" + escapeHTML(v.Text) + ` <small style="color:#4b5563">` + proseHTML(v.reason()) + "</small></div>"
}

// LaTeX is the answer with the evidence in small print, as part of a paragraph.
func (v Verdict) LaTeX() string {
	return escapeLaTeX(v.Text) + `\quad{\footnotesize ` + proseLaTeX(v.reason()) + "}"
}

// Table is the evidence in full: standing, reason, witness and source.
func (v Verdict) Table() Table {
	t := Table{
		Caption: "Evidence for the answer " + v.Text,
		Columns: []Column{{Head: "what"}, {Head: "content"}},
	}
	row := func(name, value string) {
		t.Rows = append(t.Rows, []Cell{{Text: name}, {Text: value}})
	}
	row("standing", v.Evidence.Standing.String())
	if v.Evidence.Reason != "" {
		row("reason", v.Evidence.Reason)
	}
	for _, f := range v.Evidence.Witness {
		row(f.Name, fmt.Sprint(f.Value))
	}
	if v.Evidence.Source != "" {
		row("source", v.Evidence.Source)
	}
	t.Total = len(t.Rows)
	return t
}

func oneLine(s string) string { return strings.Join(strings.Fields(s), " ") }
