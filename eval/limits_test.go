package eval

import (
	"context"
	"strings"
	"testing"
	"time"

	"adjoin/eval/display"
)

// TestBadInput runs what users and strangers type by mistake or on purpose:
// each ends within a second in an error of a few lines, and the session lives.
func TestBadInput(t *testing.T) {
	s := NewSession(Options{})
	if _, err := run(s, "let kept = 7"); err != nil {
		t.Fatal(err.Text())
	}
	for _, c := range []struct{ name, src, want string }{
		{"unknown name", "kpet + 1", "UnknownWord"},
		{"unknown phrase", "minimal polynom of 3", "UnknownWord"},
		{"unbalanced", "(1 + 2", "Syntax"},
		{"nested parentheses", strings.Repeat("(", 100_000) + "1" + strings.Repeat(")", 100_000), "Syntax"},
		{"a line of 1 MB", strings.Repeat("1+", 1<<19) + "1", "Syntax"},
		{"more than 1 MB", strings.Repeat("#", 1<<20) + "\n1/0", "Syntax"},
		{"invalid UTF-8", "let a\xff = 1", "Syntax"},
		{"huge power", "2^(10^12)", "TooLarge"},
		{"huge tower", "2^(2^(2^(2^(2^2))))", "TooLarge"},
		{"huge degree", "x^(10^10)", "TooLarge"},
		{"huge product", "(2^30000000)*(2^30000000)", "TooLarge"},
		{"huge list", "[n for n in 1..(10^12)]", "TooLarge"},
		{"endless recursion", "let f(n) = f(n + 1) + 1\nf(0)", "TooLarge"},
		{"endless recursion by a lambda", "let f(n) = (x |-> f(x))(n)\nf(0)", "TooLarge"},
		{"division by zero", "1/0", "Undefined"},
		{"division by zero modulo n", "(1 over Z/5)/(0 over Z/5)", "Undefined"},
		{"no comparison", "1 = \"a\"", "Mismatch"},
		{"no order", "x <= x^2", "Mismatch"},
		{"number called", "let n = 5\nn(4)", "Invalid"},
		{"false claim", "claim 1 = 2", "FalseClaim"},
		{"claim about a number", "claim 7", "Invalid"},
		{"wrong kind", "divisors of x", "Invalid"},
		{"wrong preposition", "divisors over 7", "Invalid"},
		{"index out of range", "[1, 2][3]", "Undefined"},
		{"names and values", "let (a, b) = (1, 2, 3)", "Invalid"},
		{"permutation", "(1 2 3)", "Unable"},
	} {
		t.Run(c.name, func(t *testing.T) {
			start := time.Now()
			_, err := run(s, c.src)
			if err == nil {
				t.Fatal("no error")
			}
			if err.Name != c.want {
				t.Errorf("error %s, want %s:\n%s", err.Name, c.want, err.Text())
			}
			if n := len(err.Text()); n > 2000 || strings.Count(err.Text(), "\n") > 5 {
				t.Errorf("the error has %d bytes", n)
			}
			if d := time.Since(start); d > 20*time.Second {
				t.Errorf("took %s", d)
			}
			if out, err := run(s, "kept"); err != nil || out != "7" {
				t.Errorf("the session lost its names: %q", out)
			}
		})
	}
}

// TestFailedCellBindsNothing: a cell that fails leaves every name as it was.
func TestFailedCellBindsNothing(t *testing.T) {
	s := NewSession(Options{})
	run(s, "let n = 1")
	if _, err := run(s, "let n = 2\nlet m = 3\n1/0"); err == nil {
		t.Fatal("no error")
	}
	if out, _ := run(s, "n"); out != "1" {
		t.Errorf("n is %s", out)
	}
	if out, _ := run(s, "m"); out != "m" {
		t.Errorf("m is %s", out)
	}
}

// TestInterrupt: when its context ends, Execute returns at once, whatever the
// cell is doing, and the next cell runs.
func TestInterrupt(t *testing.T) {
	for i, src := range []string{
		"let f(n) = if n = 0 then 0 else f(n - 1)\n[f(1000) for n in 1..1000000]",
		"number of [n for n in 1..1000000, m in 1..1000000 where n*m = 7]",
		"sum of [n^2 for n in 1..1000000, m in 1..1000000 where n < 0]",
		"let n = 3^(2*10^7)\n[(n + k)*(n - k) for k in 1..1000]",
		"factorization of (random polynomial of degree 3000 over F_{2^61})",
		"order of g_{2^509}",
		"normal basis of F_{2^400}/F_2",
		"lattice of F_{2^1680}/F_2",
		"(x + 1)^100000",
	} {
		if testing.Short() && i%3 > 0 {
			continue
		}
		s := NewSession(Options{})
		ctx, cancel := context.WithCancel(context.Background())
		pulled := make(chan time.Time, 1)
		time.AfterFunc(80*time.Millisecond, func() {
			pulled <- time.Now()
			cancel()
		})
		var r recorder
		err := s.Execute(ctx, src, &r)
		end := time.Now()
		if err == nil || err.Name != "Interrupted" {
			t.Errorf("%s: %v", src, err)
			continue
		}
		// The promise is 100 ms; the bound leaves room for a machine that is busy.
		if late := end.Sub(<-pulled); late > time.Second {
			t.Errorf("%s: returned %s after the interrupt", src, late)
		}
		if out, err := run(s, "1 + 1"); err != nil || out != "2" {
			t.Errorf("the next cell: %q", out)
		}
	}
}

func TestBudgets(t *testing.T) {
	s := NewSession(Options{Budget: Budget{Time: 100 * time.Millisecond}})
	if _, err := run(s, "[n for n in 1..1000000, m in 1..1000000 where n < 0]"); err == nil || err.Name != "TooLarge" {
		t.Errorf("time: %v", err)
	}
	s = NewSession(Options{Budget: Budget{Memory: 32 << 20}})
	if _, err := run(s, "let l = [[n^2000 + k for k in 1..20000] for n in 100000..200000]"); err == nil || err.Name != "TooLarge" {
		t.Errorf("memory: %v", err)
	}
	s = NewSession(Options{Budget: Budget{Output: 1000}})
	if out, err := run(s, "2^100000"); err != nil || len(out) > 1200 || !strings.Contains(out, "cut") {
		t.Errorf("output: %d bytes", len(out))
	}
}

// stubborn is a sink that tells when it is called.
type stubborn struct{ recorder }

func (*stubborn) Display(display.Bundle) { panic("a defect in the sink") }

// TestDefect: a panic inside becomes an error that asks for a report.
func TestDefect(t *testing.T) {
	s := NewSession(Options{})
	run(s, "let n = 1")
	var out stubborn
	err := s.Execute(context.Background(), "let n = 2\n1\n2", &out)
	if err == nil || err.Name != "Defect" || !strings.Contains(err.Remedy, "report") {
		t.Fatalf("%v", err)
	}
	if out, _ := run(s, "n"); out != "1" {
		t.Errorf("n is %s", out)
	}
}
