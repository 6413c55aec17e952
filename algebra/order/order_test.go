package order

import (
	"errors"
	"math/big"
	"math/rand/v2"
	"reflect"
	"testing"

	"adjoin/algebra"
)

// known makes an order whose relation is sound.
func known(t *testing.T, n int, atMost func(i, j int) bool) *Order {
	t.Helper()
	o, err := New(algebra.NewWork(nil), n, atMost)
	if err != nil {
		t.Fatal(err)
	}
	return o
}

// divisors is the order of the divisors of n by divisibility.
func divisors(t *testing.T, n int) ([]int, *Order) {
	t.Helper()
	var list []int
	for d := 1; d <= n; d++ {
		if n%d == 0 {
			list = append(list, d)
		}
	}
	return list, known(t, len(list), func(i, j int) bool { return list[j]%list[i] == 0 })
}

// Covers of divisors differ by a prime, the rank counts prime factors, meets
// and joins are gcd and lcm, and the Möbius function is the classical one: R.
// Stanley, Enumerative Combinatorics, volume 1, 2nd edition 2012, examples
// 3.1.1 and 3.8.4.
func TestDivisors(t *testing.T) {
	w := algebra.NewWork(nil)
	for n := 1; n <= 120; n++ {
		list, o := divisors(t, n)
		edges := 0
		for i, a := range list {
			if o.Rank(i) != primeFactors(a) {
				t.Fatalf("rank of %d among the divisors of %d is %d", a, n, o.Rank(i))
			}
			for j, b := range list {
				if b%a == 0 && primeFactors(b/a) == 1 {
					edges++
				}
				want := 0
				if b%a == 0 {
					want = mobius(b / a)
				}
				if got := o.Mobius(w, i, j); got.Cmp(big.NewInt(int64(want))) != 0 {
					t.Fatalf("mu(%d, %d) is %v, want %d", a, b, got, want)
				}
				meet, ok1 := o.Meet(i, j)
				join, ok2 := o.Join(i, j)
				if g := gcd(a, b); !ok1 || !ok2 || list[meet] != g || list[join] != a/g*b {
					t.Fatalf("meet and join of %d and %d are %d and %d", a, b, list[meet], list[join])
				}
			}
		}
		if len(o.Covers()) != edges {
			t.Fatalf("%d covers among the divisors of %d, want %d", len(o.Covers()), n, edges)
		}
		if !o.IsGraded().Holds || len(o.Minimal()) != 1 || len(o.Maximal()) != 1 {
			t.Fatalf("the divisors of %d are a graded lattice", n)
		}
	}
}

func gcd(a, b int) int {
	for b != 0 {
		a, b = b, a%b
	}
	return a
}

func primeFactors(n int) int {
	k := 0
	for p := 2; n > 1; p++ {
		for ; n%p == 0; n /= p {
			k++
		}
	}
	return k
}

func mobius(n int) int {
	m := 1
	for p := 2; n > 1; p++ {
		if n%p == 0 {
			if n /= p; n%p == 0 {
				return 0
			}
			m = -m
		}
	}
	return m
}

// Random orders against the definitions, spelt out. The seed is fixed.
func TestRandom(t *testing.T) {
	const seed = 7
	t.Logf("seed %d", seed)
	r := rand.New(rand.NewPCG(seed, seed))
	for round := range 300 {
		n := r.IntN(14)
		if round%50 == 0 {
			n = 70 + r.IntN(60) // sets of several words
		}
		label := r.Perm(n)
		less := make([][]bool, n)
		for i := range less {
			less[i] = make([]bool, n)
		}
		for i := range n {
			for j := range n {
				less[i][j] = label[i] < label[j] && r.IntN(4) == 0
			}
		}
		for k := range n {
			for i := range n {
				for j := range n {
					less[i][j] = less[i][j] || less[i][k] && less[k][j]
				}
			}
		}
		o := known(t, n, func(i, j int) bool { return less[i][j] })
		var covers []Cover
		for j := range n {
			for i := range n {
				between := false
				for k := range n {
					between = between || less[i][k] && less[k][j]
				}
				if less[i][j] && !between {
					covers = append(covers, Cover{i, j})
				}
			}
		}
		if !reflect.DeepEqual(o.Covers(), covers) {
			t.Fatalf("covers %v, want %v", o.Covers(), covers)
		}
		var chain func(j int) int
		chain = func(j int) int {
			longest := 0
			for _, c := range covers {
				if c.Upper == j {
					longest = max(longest, 1+chain(c.Lower))
				}
			}
			return longest
		}
		place := make([]int, n)
		line := o.LinearExtension()
		if len(line) != n {
			t.Fatalf("a linear extension of %d elements out of %d", len(line), n)
		}
		for k, i := range line {
			place[i] = k
		}
		for i := range n {
			if n < 20 && o.Rank(i) != chain(i) {
				t.Fatalf("rank %d, longest chain %d", o.Rank(i), chain(i))
			}
			for j := range n {
				if o.AtMost(i, j) != (i == j || less[i][j]) {
					t.Fatalf("%d <= %d should be %v", i, j, i == j || less[i][j])
				}
				if less[i][j] && place[i] >= place[j] {
					t.Fatalf("%d < %d, but not in the linear extension", i, j)
				}
				if n >= 20 {
					continue
				}
				// Meets by the definition.
				want, found := 0, false
				for k := range n {
					greatest := o.AtMost(k, i) && o.AtMost(k, j)
					for h := range n {
						if o.AtMost(h, i) && o.AtMost(h, j) && !o.AtMost(h, k) {
							greatest = false
						}
					}
					if greatest {
						want, found = k, true
					}
				}
				if got, ok := o.Meet(i, j); ok != found || ok && got != want {
					t.Fatalf("meet of %d and %d is %d, %v; want %d, %v", i, j, got, ok, want, found)
				}
			}
		}
	}
}

func TestNotAnOrder(t *testing.T) {
	w := algebra.NewWork(nil)
	for name, atMost := range map[string]func(i, j int) bool{
		"a cycle of two": func(i, j int) bool { return i+j == 1 },
		"not transitive": func(i, j int) bool { return j == i+1 },
	} {
		var e *algebra.Error
		if _, err := New(w, 3, atMost); !errors.As(err, &e) || e.Kind != algebra.Invalid {
			t.Errorf("%s: %v", name, err)
		}
	}
	var e *algebra.Error
	if _, err := New(w, MostElements+1, nil); !errors.As(err, &e) || e.Kind != algebra.TooLarge {
		t.Errorf("too many elements: %v", err)
	}
}

// The pentagon 0 < 1 < 2 < 4, 0 < 3 < 4 is a lattice that is not graded: R.
// Stanley, Enumerative Combinatorics, volume 1, 2nd edition 2012, section 3.3.
func TestPentagon(t *testing.T) {
	o := known(t, 5, func(i, j int) bool { return i == 0 || j == 4 || i == 1 && j == 2 })
	want := []Cover{{0, 1}, {1, 2}, {0, 3}, {2, 4}, {3, 4}}
	if !reflect.DeepEqual(o.Covers(), want) {
		t.Errorf("covers %v, want %v", o.Covers(), want)
	}
	if o.IsGraded().Holds || o.Height() != 3 {
		t.Errorf("height %d, graded: %+v", o.Height(), o.IsGraded())
	}
	if j, ok := o.Join(1, 3); !ok || j != 4 {
		t.Errorf("join of 1 and 3 is %d, %v", j, ok)
	}
	empty := known(t, 0, nil)
	if len(empty.Covers()) != 0 || empty.Height() != -1 || !empty.IsGraded().Holds {
		t.Error("the empty order")
	}
}
