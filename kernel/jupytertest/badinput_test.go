package jupytertest

import (
	"strings"
	"testing"
)

// What users and strangers type by mistake or on purpose, in a kernel of its
// own: each is answered by an error of a few lines that says what is wrong, and
// the session goes on with its names.
func TestBadInput(t *testing.T) {
	s := start(t, "--time", "10s")
	if o := s.run(t, "let kept = g_16 + 1"); o.Name != "" {
		t.Fatal(o)
	}
	const most = 2 << 10 // bytes of a traceback
	for _, c := range []struct{ name, code, class, says string }{
		{"reducible modulus", "let L = F_2(b) where b^4 = b^2 + 1", "ReducibleModulus", "(x^2 + x + 1)^2"},
		{"no field has six elements", "F_6", "Invalid", "6 = 2 * 3"},
		{"division by zero", "1/0", "Undefined", "division by zero"},
		{"division by zero in a field", "1/(kept - kept)", "Undefined", "division by zero"},
		{"characteristics", "g_4 + g_9", "Mismatch", "characteristic 2 and 3"},
		{"unknown word", "trase of kept", "UnknownWord", "trace"},
		{"unknown name", "kept + kpet", "UnknownWord", "kpet"},
		{"bracket", "(1 + 2", "Syntax", "not closed"},
		{"100,000 parentheses", strings.Repeat("(", 100_000) + "1" + strings.Repeat(")", 100_000), "Syntax", ""},
		{"a line of 1 MB", strings.Repeat("1+", 1<<19) + "1", "Syntax", ""},
		{"a replacement character", "let a\uFFFD = 1", "Syntax", ""},
		{"huge power", "2^(10^12)", "TooLarge", "1,000,000,000,000 bits"},
		{"huge field", "F_{2^(10^9)}", "TooLarge", "degree 1000000000"},
		{"huge degree", "x^(10^10)", "TooLarge", "degree 10000000000"},
		{"huge degree over a field", "x^(10^10) over F_2", "TooLarge", "degree 10000000000"},
		{"endless recursion", "let f(n) = f(n + 1)\nf(1)", "TooLarge", "nests deeper"},
		{"endless list", "[n for n in 1..10^12]", "TooLarge", "members"},
		{"a name taken back", "let kept = 1\n1/0", "Undefined", "division by zero"},
		{"NUL", "1 + \x00", "Syntax", ""},
	} {
		t.Run(c.name, func(t *testing.T) {
			o := s.run(t, c.code)
			if o.Name != c.class {
				t.Errorf("the error is %q, not %q", o.Name, c.class)
			}
			text := strings.Join(o.Traceback, "\n")
			if !strings.Contains(text, c.says) {
				t.Errorf("the error does not say %q:\n%s", c.says, text)
			}
			if n := strings.Count(text, "\n"); n > 5 || len(text) > most {
				t.Errorf("the error has %d lines and %d bytes", n+1, len(text))
			}
			if o := s.run(t, "kept"); o.result != "g_16 + 1" {
				t.Errorf("the session lost its names: %+v", o)
			}
		})
	}
}
