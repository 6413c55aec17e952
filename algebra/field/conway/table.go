package conway

import (
	_ "embed"
	"math/big"
	"strconv"
	"strings"
	"sync"
)

//go:embed table.txt
var text string

type key struct{ p, n int64 }

// table maps to lines; they are parsed when they are asked for.
var table = sync.OnceValue(func() map[key]string {
	t := map[key]string{}
	for line := range strings.Lines(text) {
		f := strings.SplitN(strings.TrimSpace(line), " ", 3)
		p, _ := strconv.ParseInt(f[0], 10, 64)
		n, _ := strconv.ParseInt(f[1], 10, 64)
		t[key{p, n}] = f[2]
	}
	return t
})

// Has says whether the table has C_{p,n}.
func Has(p *big.Int, n int) bool {
	if !p.IsInt64() {
		return false
	}
	_, ok := table()[key{p.Int64(), int64(n)}]
	return ok
}

// Lookup is the list of coefficients of C_{p,n}, constant term first and the
// leading 1 included, if the table has it.
func Lookup(p *big.Int, n int) (c []int64, ok bool) {
	if !Has(p, n) {
		return nil, false
	}
	for _, s := range strings.Fields(table()[key{p.Int64(), int64(n)}]) {
		x, _ := strconv.ParseInt(s, 10, 64)
		c = append(c, x)
	}
	return append(c, 1), true
}
