package value

import (
	"fmt"
	"math/big"
	"math/rand/v2"

	"adjoin/algebra"
)

// Limits bound the size of single values. They hold before the work starts.
type Limits struct {
	Bits   int // of an integer
	Length int // of a list that is written out
	Degree int // of a polynomial, absolute degree of a field
	Depth  int // of nested evaluation
}

// DefaultLimits are generous for exploration and far from what would exhaust
// a laptop.
var DefaultLimits = Limits{Bits: 1 << 25, Length: 1 << 20, Degree: 1 << 20, Depth: 20_000}

// MaxFieldDegree bounds the absolute degree of a finite field: beyond it one
// multiplication is no longer something to wait for.
const MaxFieldDegree = 1 << 14

// Context is what a computation needs beside its operands. It belongs to one
// cell and one goroutine.
type Context struct {
	W      *algebra.Work
	Limits Limits
	Random *rand.Rand
	Warn   func(text string)
	Print  func() *Printer // the printer of this moment; may be nil
	depth  int
}

// Printer is how values print at this moment.
func (c *Context) Printer() *Printer {
	if c.Print == nil {
		return nil
	}
	return c.Print()
}

// RandomBelow is a random integer at least 0 and less than n.
func RandomBelow(c *Context, n *big.Int) *big.Int {
	// Sixty-four bits more than n has make the remainder as good as uniform.
	r := new(big.Int)
	for range n.BitLen()/64 + 2 {
		r.Lsh(r, 64)
		r.Or(r, new(big.Int).SetUint64(c.Random.Uint64()))
	}
	return r.Mod(r, n)
}

// Enter counts one more level of nested evaluation; each call that returns nil
// needs a Leave.
func (c *Context) Enter() error {
	c.W.Poll()
	if c.depth >= c.Limits.Depth {
		return algebra.Errorf(algebra.TooLarge, "the evaluation nests deeper than %s levels", Grouped(c.Limits.Depth)).
			WithRemedy("a function that calls itself needs a case in which it does not: if n = 0 then ... else ...")
	}
	c.depth++
	return nil
}

// Leave ends a level of nested evaluation.
func (c *Context) Leave() { c.depth-- }

// CheckBits refuses an integer of that many bits when it is too many.
func (c *Context) CheckBits(bits float64) error {
	if bits > float64(c.Limits.Bits) {
		return algebra.Errorf(algebra.TooLarge, "the integer would have about %s bits, more than the limit of %s", magnitude(bits), Grouped(c.Limits.Bits)).
			WithRemedy("powers of an element, or of a residue such as 2 over Z/n, take exponents of any size")
	}
	return nil
}

// CheckDegree refuses a polynomial of that degree when it is too large.
func (c *Context) CheckDegree(n *big.Int) error {
	if !n.IsInt64() || n.Int64() > int64(c.Limits.Degree) {
		return algebra.Errorf(algebra.TooLarge, "the polynomial would have degree %s, more than the limit of %s", Short(n), Grouped(c.Limits.Degree)).
			WithRemedy("a large power is meant modulo something: write it in a quotient or a field")
	}
	return nil
}

// CheckLength refuses to write out a list of that length when it is too long.
// A nil length is an infinite one.
func (c *Context) CheckLength(n *big.Int) error {
	if n == nil {
		return algebra.Errorf(algebra.TooLarge, "there are infinitely many").WithRemedy("ask for a part of them, with a range or a condition")
	}
	if !n.IsInt64() || n.Int64() > int64(c.Limits.Length) {
		return algebra.Errorf(algebra.TooLarge, "that would be a list of %s members, more than the limit of %s", Short(n), Grouped(c.Limits.Length)).
			WithRemedy("number of ... counts without listing")
	}
	return nil
}

// Grouped writes n in groups of three digits.
func Grouped(n int) string {
	s := fmt.Sprint(n)
	for i := len(s) - 3; i > 0 && s[i-1] != '-'; i -= 3 {
		s = s[:i] + "," + s[i:]
	}
	return s
}

// Short writes an integer, in the middle cut when it is long.
func Short(n *big.Int) string {
	if n.BitLen() <= 200 {
		return n.String()
	}
	return fmt.Sprintf("a number of %s bits", Grouped(n.BitLen()))
}

func magnitude(x float64) string {
	if x < 1e15 {
		return Grouped(int(x))
	}
	return fmt.Sprintf("%.3g", x)
}
