package vocabulary

import (
	"math/rand/v2"
	"slices"
	"testing"
)

func TestNear(t *testing.T) {
	known := []string{"minimal polynomial", "characteristic polynomial", "trace", "norm", "order", "degree", "primitive", "Frobenius"}
	for _, c := range []struct{ words, want string }{
		{"trcae", "trace"},
		{"minimal polynomail", "minimal polynomial"},
		{"minimum polynomial", "minimal polynomial"},
		{"frobenius", "Frobenius"},
		{"primitve", "primitive"},
		{"xyzzy", ""},
	} {
		near := Near(c.words, known)
		if c.want == "" && len(near) > 0 || c.want != "" && (len(near) == 0 || near[0] != c.want) {
			t.Errorf("%s: %v", c.words, near)
		}
	}
}

// TestDistance compares the table with the recursive definition.
func TestDistance(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2)) // fixed seed
	word := func() string {
		b := make([]byte, r.IntN(6))
		for i := range b {
			b[i] = "abc"[r.IntN(3)]
		}
		return string(b)
	}
	for range 2000 {
		a, b := word(), word()
		if got, want := distance(a, b), slowDistance(a, b); got != want {
			t.Fatalf("distance(%q, %q) = %d, want %d", a, b, got, want)
		}
	}
}

func slowDistance(a, b string) int {
	if a == "" || b == "" {
		return len(a) + len(b)
	}
	i, j := len(a)-1, len(b)-1
	cost := 1
	if a[i] == b[j] {
		cost = 0
	}
	d := min(slowDistance(a[:i], b)+1, slowDistance(a, b[:j])+1, slowDistance(a[:i], b[:j])+cost)
	if i > 0 && j > 0 && a[i] == b[j-1] && a[i-1] == b[j] {
		d = min(d, slowDistance(a[:i-1], b[:j-1])+1)
	}
	return d
}

// TestLexicon: the parser's lexicon lists words and roles once.
func TestLexicon(t *testing.T) {
	l := Lexicon()
	for _, list := range [][]string{l.Nouns, l.Predicates, l.Verbs, l.Forms, l.Roles["from"], l.Roles["of"]} {
		sorted := slices.Clone(list)
		slices.Sort(sorted)
		if len(slices.Compact(sorted)) != len(list) || len(list) == 0 {
			t.Errorf("repeated or empty: %v", list)
		}
	}
}
