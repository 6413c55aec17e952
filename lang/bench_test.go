package lang

import (
	"strings"
	"testing"
)

var cell = strings.Join([]string{
	"let K = F_2(a) where a^8 = a^4 + a^3 + a^2 + 1      # binds K and a",
	"let f(n) = (x^n - 1)/(x - 1)",
	"minimal polynomial of a^5 over F_4",
	"[f(n) for n in 1..20 where n is prime]",
	"claim K is a field and F_4 is a subfield of K",
	"CRC polynomial from reflected 0x8408 of width 16",
}, "\n")

func BenchmarkParseCell(b *testing.B) {
	b.SetBytes(int64(len(cell)))
	b.ReportAllocs()
	for b.Loop() {
		if _, fault := Parse(cell, testLexicon); fault != nil {
			b.Fatal(fault)
		}
	}
}

func BenchmarkParseLongSum(b *testing.B) {
	src := strings.Repeat("1+", 9_000) + "1"
	b.SetBytes(int64(len(src)))
	b.ReportAllocs()
	for b.Loop() {
		if _, fault := Parse(src, testLexicon); fault != nil {
			b.Fatal(fault)
		}
	}
}

func BenchmarkParseMegabyteSum(b *testing.B) {
	src := strings.Repeat("1+", 1<<19-1) + "1"
	b.SetBytes(int64(len(src)))
	b.ReportAllocs()
	for b.Loop() {
		if _, fault := Parse(src, testLexicon); fault == nil {
			b.Fatal("no fault")
		}
	}
}

func BenchmarkTokens(b *testing.B) {
	b.SetBytes(int64(len(cell)))
	b.ReportAllocs()
	for b.Loop() {
		Tokens(cell)
	}
}

func BenchmarkPrint(b *testing.B) {
	list, fault := Parse(cell, testLexicon)
	if fault != nil {
		b.Fatal(fault)
	}
	b.ReportAllocs()
	for b.Loop() {
		printAll(list)
	}
}
