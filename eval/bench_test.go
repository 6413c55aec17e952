package eval

import (
	"context"
	"testing"

	"adjoin/eval/display"
)

// silent is a sink that drops everything.
type silent struct{}

func (silent) Say(string)             {}
func (silent) Display(display.Bundle) {}
func (silent) Result(display.Bundle)  {}
func (silent) Page(display.Bundle)    {}
func (silent) Clear(bool)             {}
func (silent) Warn(string)            {}

func benchmarkCell(b *testing.B, setup, src string) {
	s := NewSession(Options{})
	if err := s.Execute(context.Background(), setup, silent{}); err != nil {
		b.Fatal(err.Text())
	}
	for b.Loop() {
		if err := s.Execute(context.Background(), src, silent{}); err != nil {
			b.Fatal(err.Text())
		}
	}
}

func BenchmarkSum(b *testing.B) { benchmarkCell(b, "", "1 + 1") }
func BenchmarkLoop(b *testing.B) {
	benchmarkCell(b, "", "sum of [n^2 for n in 1..10000 where n mod 3 = 1]")
}
func BenchmarkRecursion(b *testing.B) {
	benchmarkCell(b, "let f(n) = if n < 2 then n else f(n - 1) + f(n - 2)", "f(15)")
}
func BenchmarkElements(b *testing.B) {
	benchmarkCell(b, "let K = F_2(a) where a^8 = a^4 + a^3 + a^2 + 1", "frequencies of [order of e for e in elements of K where e != 0]")
}
func BenchmarkSubfields60(b *testing.B) { benchmarkCell(b, "", "subfields of F_{2^60}") }
func BenchmarkLattice60(b *testing.B)   { benchmarkCell(b, "", "lattice of F_{2^60}/F_2") }
func BenchmarkOrder127(b *testing.B)    { benchmarkCell(b, "", "order of g_{2^127} + 1") }
func BenchmarkOrder3to60(b *testing.B)  { benchmarkCell(b, "", "order of g_{3^60} + 1") }
