package integer

import (
	"math/big"
	"math/rand/v2"
	"sort"

	"adjoin/algebra"
	"adjoin/algebra/internal/word"
)

// References:
//
//	[Brent] R. Brent, An improved Monte Carlo factorization algorithm, 1980.
//
// The methods p-1 and of elliptic curves have files of their own.

// PrimePower is P^E.
type PrimePower struct {
	P *big.Int
	E int
}

// Factorization is a positive integer as a product of prime powers, in
// increasing order of the primes, times a cofactor: nil, or a composite number
// that the effort spent did not split. Standing is Probable when one of the
// primes is only probably prime.
type Factorization struct {
	Primes   []PrimePower
	Cofactor *big.Int
	Standing algebra.Standing
}

// Complete says whether all primes are known.
func (f Factorization) Complete() bool { return f.Cofactor == nil }

// Value is the number that was factored.
func (f Factorization) Value() *big.Int {
	n := big.NewInt(1)
	for _, p := range f.Primes {
		n.Mul(n, new(big.Int).Exp(p.P, big.NewInt(int64(p.E)), nil))
	}
	if f.Cofactor != nil {
		n.Mul(n, f.Cofactor)
	}
	return n
}

// Distinct is the list of the primes.
func (f Factorization) Distinct() []*big.Int {
	list := make([]*big.Int, len(f.Primes))
	for i, p := range f.Primes {
		list[i] = p.P
	}
	return list
}

// Factor factors n >= 1. The effort is bounded and the same each time: trial
// division, Brent's variant of the rho method, p-1, and elliptic curves enough
// for prime factors of about 25 digits. What is left composite is the
// cofactor.
func Factor(w *algebra.Work, n *big.Int) Factorization { return factor(w, n, 1, nil) }

// factor is Factor for numbers whose prime factors are 1 modulo step, apart
// from those found by trial division; the known primes are tried first.
func factor(w *algebra.Work, n *big.Int, step int, known []*big.Int) Factorization {
	c := &collector{w: w, step: step, count: map[string]*PrimePower{}}
	m := c.trial(new(big.Int).Set(n))
	for _, p := range known {
		c.take(m, p)
	}
	c.split(m, 1)
	return c.result()
}

// collector gathers the prime factors of one number.
type collector struct {
	w     *algebra.Work
	step  int
	count map[string]*PrimePower
	left  *big.Int
}

func (c *collector) add(p *big.Int, e int) {
	key := string(p.Bytes())
	if c.count[key] == nil {
		c.count[key] = &PrimePower{new(big.Int).Set(p), 0}
	}
	c.count[key].E += e
}

func (c *collector) result() Factorization {
	f := Factorization{Cofactor: c.left}
	for _, p := range c.count {
		f.Primes = append(f.Primes, *p)
		if !p.P.IsUint64() {
			f.Standing = algebra.Probable
		}
	}
	sort.Slice(f.Primes, func(i, j int) bool { return f.Primes[i].P.Cmp(f.Primes[j].P) < 0 })
	return f
}

// trial takes out the primes below 2^12 and returns the rest; when all prime
// factors are 1 modulo step, also those below 2^12 step.
func (c *collector) trial(n *big.Int) *big.Int {
	d := new(big.Int)
	for _, p := range smallPrimes {
		if n.IsUint64() {
			return n.SetUint64(c.trial64(n.Uint64()))
		}
		c.take(n, d.SetInt64(int64(p)))
	}
	if c.step > 2 {
		for k := int64(1); k <= 1<<12 && n.Cmp(one) > 0; k++ {
			if p := k*int64(c.step) + 1; isPrime64(uint64(p)) {
				c.take(n, d.SetInt64(p))
			}
		}
	}
	return n
}

// trial64 is trial without the step, in machine words.
func (c *collector) trial64(n uint64) uint64 {
	for _, p := range smallPrimes {
		q := uint64(p)
		if q*q > n {
			break // n is 1 or a prime
		}
		e := 0
		for ; n%q == 0; n /= q {
			e++
		}
		if e > 0 {
			c.add(big.NewInt(int64(p)), e)
		}
	}
	return n
}

// take divides n by the prime p as often as it goes.
func (c *collector) take(n, p *big.Int) {
	q, r := new(big.Int), new(big.Int)
	for {
		if q.QuoRem(n, p, r); r.Sign() != 0 {
			return
		}
		c.add(p, 1)
		n.Set(q)
	}
}

// split factors n^e, where n has no small prime factors.
func (c *collector) split(n *big.Int, e int) {
	if n.Cmp(one) == 0 {
		return
	}
	c.w.Poll()
	if isProbablyPrime(n) {
		c.add(n, e)
		return
	}
	if root, k := perfectPower(n); k > 1 {
		c.split(root, k*e)
		return
	}
	d := c.divisor(n)
	if d == nil {
		if c.left == nil {
			c.left = big.NewInt(1)
		}
		for range e {
			c.left.Mul(c.left, n)
		}
		return
	}
	rest := new(big.Int).Div(n, d)
	// Coprime parts, so that equal primes are found once.
	if g := new(big.Int).GCD(nil, nil, d, rest); g.Cmp(one) != 0 && g.Cmp(d) != 0 {
		c.split(g, 2*e)
		c.split(d.Div(d, g), e)
		c.split(rest.Div(rest, g), e)
		return
	}
	c.split(d, e)
	c.split(rest, e)
}

// divisor is a proper divisor of a composite n, or nil.
func (c *collector) divisor(n *big.Int) *big.Int {
	if n.BitLen() <= 62 {
		return new(big.Int).SetUint64(rho64(c.w, n.Uint64(), uint64(c.step)))
	}
	if d := rho(c.w, n, c.step, 1<<15); d != nil {
		return d
	}
	if d := pMinus1(c.w, n, c.step); d != nil {
		return d
	}
	return ecm(c.w, n)
}

// rho64 is a proper divisor of a composite n below 2^62 without small prime
// factors [Brent]. The map is x^2 + c; walks that fail are repeated with
// another c.
func rho64(w *algebra.Work, n, step uint64) uint64 {
	m := word.New(n)
	for c := uint64(1); ; c++ {
		w.Poll()
		y, g, r := c+1, uint64(1), 1
		var x, saved uint64
		for g == 1 {
			x = y
			for range r {
				y = m.Add(m.Mul(y, y), c)
			}
			for k := 0; k < r && g == 1; k += 128 {
				saved = y
				q := uint64(1)
				for range min(128, r-k) {
					y = m.Add(m.Mul(y, y), c)
					q = m.Mul(q, m.Sub(x, y))
				}
				g = gcd64(q, n)
			}
			r *= 2
		}
		if g == n {
			// All at once: step by step from the saved place.
			for g = 1; g == 1; {
				saved = m.Add(m.Mul(saved, saved), c)
				g = gcd64(m.Sub(x, saved), n)
			}
		}
		if g != n {
			return g
		}
	}
}

func gcd64(a, b uint64) uint64 {
	for b != 0 {
		a, b = b, a%b
	}
	return a
}

// rho is a proper divisor of n, or nil after the given number of steps. The
// map is x^step' + c with an even exponent that prime factors 1 modulo step
// make many-to-one [Brent].
func rho(w *algebra.Work, n *big.Int, step, limit int) *big.Int {
	e := big.NewInt(2)
	if step > 2 && step < 64 {
		e.SetInt64(int64(step + step%2*step))
	}
	x, y, q, t, c := new(big.Int), big.NewInt(2), big.NewInt(1), new(big.Int), big.NewInt(1)
	next := func(y *big.Int) {
		if e.Int64() == 2 {
			t.Mul(y, y)
			y.Mod(t, n)
		} else {
			y.Exp(y, e, n)
		}
		y.Add(y, c)
	}
	for r, done := 1, 0; done < limit; r *= 2 {
		x.Set(y)
		for range r {
			next(y)
		}
		for k := 0; k < r && done < limit; k += 64 {
			w.Poll()
			saved := new(big.Int).Set(y)
			for range min(64, r-k) {
				next(y)
				q.Mul(q, t.Sub(x, y))
				q.Mod(q, n)
				done++
			}
			if g := new(big.Int).GCD(nil, nil, q, n); g.Cmp(one) != 0 {
				if g.Cmp(n) != 0 {
					return g
				}
				for {
					next(saved)
					g.GCD(nil, nil, t.Abs(t.Sub(x, saved)), n)
					if g.Cmp(n) == 0 {
						return nil
					}
					if g.Cmp(one) != 0 {
						return g
					}
				}
			}
		}
	}
	return nil
}

// perfectPower writes n as root^k with the largest k.
func perfectPower(n *big.Int) (root *big.Int, k int) {
	root, k = n, 1
	for _, p := range PrimesUpTo(n.BitLen()) {
		for {
			r := Root(root, p)
			if new(big.Int).Exp(r, big.NewInt(int64(p)), nil).Cmp(root) != 0 {
				break
			}
			root, k = r, k*p
		}
	}
	return root, k
}

// Root is the integer part of the k-th root of n >= 0.
func Root(n *big.Int, k int) *big.Int {
	if k == 1 || n.Sign() == 0 {
		return new(big.Int).Set(n)
	}
	if k == 2 {
		return new(big.Int).Sqrt(n)
	}
	// Newton from above.
	x := new(big.Int).Lsh(one, uint((n.BitLen()+k-1)/k))
	kb, k1 := big.NewInt(int64(k)), big.NewInt(int64(k-1))
	for {
		y := new(big.Int).Exp(x, k1, nil)
		y.Div(n, y)
		y.Add(y, new(big.Int).Mul(x, k1))
		y.Div(y, kb)
		if y.Cmp(x) >= 0 {
			return x
		}
		x = y
	}
}

// seeded is a stream of random choices that depends on n alone.
func seeded(n *big.Int) *rand.Rand {
	var low big.Int
	return rand.New(rand.NewPCG(low.And(n, new(big.Int).SetUint64(1<<64-1)).Uint64(), uint64(n.BitLen())))
}
