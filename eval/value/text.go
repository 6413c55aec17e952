package value

import "strings"

// Text is a string.
type Text struct{ S string }

func (Text) Kind() string           { return "a text" }
func (t Text) Text(*Printer) string { return quote(t.S) }
func (t Text) Canonical() (string, map[string]any) {
	return "text", map[string]any{"value": t.S}
}

// quote writes a string literal of the language.
func quote(s string) string { return `"` + escapes.Replace(s) + `"` }

var escapes = strings.NewReplacer(`\`, `\\`, `"`, `\"`, "\n", `\n`, "\t", `\t`)
