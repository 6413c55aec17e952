package eval

import (
	"context"
	"slices"
	"strings"
	"testing"
	"time"
)

func TestComplete(t *testing.T) {
	s := NewSession(Options{})
	run(s, "let total = 3")
	for _, c := range []struct {
		src      string // | is the cursor
		from, to int
		want     string
	}{
		{"minimal pol|", 0, 11, "minimal polynomial"},
		{"1 + tra|", 4, 7, "trace"},
		{"tot|", 0, 3, "total"},
		{"x as hex, y as ta|", 15, 17, "table"},
		{"f is irre|", 5, 9, "irreducible"},
		{`let \al|`, 4, 7, "α"},
		{"explain Fro|", 8, 11, "Frobenius"},
	} {
		at := strings.Index(c.src, "|")
		got := s.Complete(strings.Replace(c.src, "|", "", 1), at)
		has := slices.ContainsFunc(got.Items, func(i Item) bool { return i.Text == c.want })
		if got.From != c.from || got.To != c.to || !has {
			t.Errorf("%s: from %d to %d, %v", c.src, got.From, got.To, got.Items)
		}
	}
}

func TestInspect(t *testing.T) {
	s := NewSession(Options{})
	run(s, "let total = 3")
	for _, c := range []struct {
		src  string
		at   int
		want string
	}{
		{"total + 1", 2, "an integer"},
		{"minimal polynomial of a", 10, "minimal polynomial (noun)"},
		{"trace of a", 0, "sum of the conjugates"},
		{"F_256", 3, "F_q"},
	} {
		b, ok := s.Inspect(c.src, c.at)
		if text, _ := b.Data["text/plain"].(string); !ok || !strings.Contains(text, c.want) {
			t.Errorf("%s: %v %q", c.src, ok, text)
		}
	}
	if _, ok := s.Inspect("1 + 1", 0); ok {
		t.Error("something is known about 1")
	}
}

// TestWhileRunning: completion, inspection and completeness answer while a
// cell runs, from the names of the cells before.
func TestWhileRunning(t *testing.T) {
	s := NewSession(Options{})
	run(s, "let total = 3")
	ctx, cancel := context.WithCancel(context.Background())
	done := make(chan struct{})
	go func() {
		defer close(done)
		var r recorder
		s.Execute(ctx, "let totem = 1\n[n for n in 1..1000000, m in 1..1000000 where n < 0]", &r)
	}()
	time.Sleep(20 * time.Millisecond)
	for range 50 {
		if got := s.Complete("tot", 3); len(got.Items) == 0 || got.Items[0].Text != "total" {
			t.Errorf("%v", got.Items)
		}
		if _, ok := s.Inspect("total", 1); !ok {
			t.Error("total is not known")
		}
		s.IsComplete("let x = (")
	}
	cancel()
	<-done
}
