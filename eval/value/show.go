package value

import (
	"encoding/json"
	"fmt"
	"strings"
	"unicode/utf8"

	"adjoin/eval/display"
)

// Shown is a value together with the form that as chose for it.
type Shown struct {
	Value
	Form display.Document
	Name string // the form, as written
	Note string // what the form says of its order, which stands at the end of its text
}

// comment is what stands before a note in a text.
const comment = "  # "

// Noted is v shown as a text and, behind it, a note on how to read it.
func Noted(v Value, name, text, note string) Shown {
	form := display.Text{Text: text}
	if note != "" {
		form.Text += comment + note
	}
	return Shown{Value: Plain(v), Form: form, Name: name, Note: note}
}

// cell is the form in a table, which has its note below.
func (s Shown) cell(p *Printer) display.Cell {
	switch f := s.Form.(type) {
	case display.Text:
		return display.Cell{Text: strings.TrimSuffix(f.Text, comment+s.Note)}
	case display.Formula:
		return display.Cell(f)
	}
	return cell(p, s.Value)
}

// Text is the text of the value: a form never changes what the value is.
func (s Shown) Text(p *Printer) string { return s.Value.Text(p) }

// MachineType is the MIME type of the machine form of a value.
const MachineType = "application/vnd.adjoin.v1+json"

// Bundle is the value in all the forms that a notebook can show. A text of
// more than limit bytes is cut.
func Bundle(v Value, p *Printer, limit int) display.Bundle {
	var b display.Bundle
	if s, ok := v.(Shown); ok {
		b = s.Form.Bundle()
	} else {
		b = document(p, v, limit).Bundle()
		b.Data["text/plain"] = plainText(v, p, b, limit)
	}
	if b.Data == nil {
		b.Data = map[string]any{}
	}
	m := Machine(v)
	if text, err := json.Marshal(m); err == nil && len(text) <= limit {
		b.Data[MachineType] = m
	}
	return b
}

// plainText is the text of a value, which evaluates to it again. What a table
// or a verdict has to say beside that follows as comments.
func plainText(v Value, p *Printer, b display.Bundle, limit int) string {
	text := Cut(v.Text(p), limit)
	switch x := v.(type) {
	case Verdict:
		if x.Plain || x.Evidence.Reason == "" {
			return text
		}
		return fmt.Sprintf("%s  # %s: %s", text, x.Evidence.Standing, x.Evidence.Reason)
	case List:
		if x.Notes == nil {
			return text
		}
	case Documented:
	default:
		return text
	}
	if d, ok := v.(Documented); ok {
		if f, ok := d.Document(p).(display.Formula); ok {
			return f.Text
		}
	}
	rich, _ := b.Data["text/plain"].(string)
	if rich == "" || rich == text {
		return text
	}
	lines := strings.Split(strings.TrimRight(rich, "\n"), "\n")
	return text + "\n" + strings.TrimRight("# "+strings.Join(lines, "\n# "), " ")
}

func document(p *Printer, v Value, limit int) display.Document {
	if d, ok := v.(Documented); ok {
		return d.Document(p)
	}
	if _, ok := v.(Typeset); ok {
		return formula(p, v)
	}
	return display.Text{Text: Cut(v.Text(p), limit)}
}

// longest formula that is typeset, in bytes of TeX; beyond, only the text is
// shown, since no line would hold it.
const formulaWidth = 4000

func formula(p *Printer, v Value) display.Document {
	text := v.Text(p)
	if len(text) > formulaWidth {
		return display.Text{Text: text}
	}
	tex := TeX(p, v)
	if len(tex) > formulaWidth {
		return display.Text{Text: text}
	}
	return display.Formula{Text: text, TeX: tex}
}

// TeX typesets any value, without delimiters.
func TeX(p *Printer, v Value) string {
	if t, ok := Plain(v).(Typeset); ok {
		return t.TeX(p)
	}
	return `\text{` + escapeTeX(v.Text(p)) + `}`
}

var texEscapes = strings.NewReplacer(`\`, `\textbackslash `, "{", `\{`, "}", `\}`, "_", `\_`, "^", `\^{}`, "#", `\#`, "$", `\$`, "%", `\%`, "&", `\&`, "~", `\~{}`)

func escapeTeX(s string) string { return texEscapes.Replace(s) }

// Machine is the machine form of a value: an object with the version of the
// form, the kind, and what belongs to the kind.
func Machine(v Value) map[string]any {
	m := machinePart(v)
	m["v"] = 1
	return m
}

// machinePart is the machine form of a value inside a larger one. A value that
// is not Canonical has its text.
func machinePart(v Value) map[string]any {
	c, ok := Plain(v).(Canonical)
	if !ok {
		return map[string]any{"kind": "expression", "text": Plain(v).Text(nil)}
	}
	kind, fields := c.Canonical()
	m := map[string]any{"kind": kind}
	for k, x := range fields {
		m[k] = x
	}
	return m
}

// Cut shortens a text of more than limit bytes and says so.
func Cut(s string, limit int) string {
	if len(s) <= limit {
		return s
	}
	head, tail := limit*3/4, limit/8
	for head > 0 && !utf8.RuneStart(s[head]) {
		head--
	}
	end := len(s) - tail
	for end < len(s) && !utf8.RuneStart(s[end]) {
		end++
	}
	return fmt.Sprintf("%s ... %s  # cut: %s characters of %s are left out", s[:head], s[end:], Grouped(end-head), Grouped(len(s)))
}
