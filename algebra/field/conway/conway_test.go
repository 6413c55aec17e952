package conway

import (
	"flag"
	"fmt"
	"os"
	"strings"
	"testing"
	"time"

	"adjoin/algebra"
	"adjoin/algebra/integer"
)

var write = flag.Bool("write", false, "make table.txt anew from the definition")

// ranges are those that doc.go states.
var ranges = []struct {
	p int64 // for primes up to p beyond the last
	n int
}{{2, 48}, {3, 30}, {5, 20}, {7, 16}, {31, 12}, {1000, 7}}

// degrees is the number of degrees in the table for the prime p.
func degrees(p int64) int {
	for _, r := range ranges {
		if p <= r.p {
			return r.n
		}
	}
	return 0
}

func TestWrite(t *testing.T) {
	if !*write {
		t.Skip("only with -write")
	}
	var b strings.Builder
	for _, q := range integer.PrimesUpTo(1000) {
		p, start := int64(q), time.Now()
		for n, c := range generate(p, degrees(p)) {
			line := fmt.Sprintf("%d %d", p, n+1)
			for _, x := range c[:n+1] {
				line += fmt.Sprintf(" %d", x)
			}
			b.WriteString(line + "\n")
		}
		if d := time.Since(start); d > time.Second {
			t.Logf("p = %d: %s", p, d.Round(time.Second))
		}
	}
	if err := os.WriteFile("table.txt", []byte(b.String()), 0o644); err != nil {
		t.Fatal(err)
	}
}

// generate is the list of C_{p,n} for n = 1, ..., top.
func generate(p int64, top int) [][]int64 {
	w := algebra.NewWork(nil)
	var list [][]int64
	for n := 1; n <= top; n++ {
		start := time.Now()
		list = append(list, Search(w, p, n, func(m int) []int64 { return list[m-1] }))
		if d := time.Since(start); d > 2*time.Second {
			fmt.Println(p, n, d.Round(time.Millisecond))
		}
	}
	return list
}
