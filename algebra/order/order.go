package order

import (
	"math/big"
	"math/bits"

	"adjoin/algebra"
)

// References:
//
//	[Stanley] R. Stanley, Enumerative Combinatorics, volume 1, 2nd edition 2012,
//	  chapter 3: covers, graded posets, chains, linear extensions, the Möbius
//	  function.
//	[AGU] A. Aho, M. Garey, J. Ullman, The transitive reduction of a directed
//	  graph, 1972: for an order it is unique, namely the covers.

// MostElements is the largest number of elements that New takes: the relation
// is kept as a square of bits.
const MostElements = 1 << 14

// Order is a partial order on the elements 0, ..., n-1. It does not change and
// may be used by several goroutines.
type Order struct {
	n     int
	below []set // below[j] holds the i < j
	above []set // above[i] holds the j > i
	lower [][]int
	upper [][]int
	rank  []int // the length of the longest chain that ends in the element
	line  []int // a linear extension
}

// set is a set of elements, a bit each.
type set []uint64

func (s set) has(i int) bool { return s[i/64]>>(i%64)&1 == 1 }

func (s set) put(i int) { s[i/64] |= 1 << (i % 64) }

func (s set) meets(t set) bool {
	for k, x := range s {
		if x&t[k] != 0 {
			return true
		}
	}
	return false
}

func (s set) within(t set) bool {
	for k, x := range s {
		if x&^t[k] != 0 {
			return false
		}
	}
	return true
}

func (s set) size() int {
	n := 0
	for _, x := range s {
		n += bits.OnesCount64(x)
	}
	return n
}

func (s set) elements() []int {
	list := make([]int, 0, s.size())
	for k, x := range s {
		for ; x != 0; x &= x - 1 {
			list = append(list, 64*k+bits.TrailingZeros64(x))
		}
	}
	return list
}

// New is the order on 0, ..., n-1 in which i <= j exactly when atMost(i, j)
// says so; atMost is asked once for each ordered pair of distinct elements. It
// is an error of kind Invalid, with the elements that show it, when the
// relation is not antisymmetric or not transitive, and of kind TooLarge when n
// passes MostElements.
func New(w *algebra.Work, n int, atMost func(i, j int) bool) (*Order, error) {
	if n > MostElements {
		return nil, algebra.Errorf(algebra.TooLarge, "an ordered set of %d elements passes the limit of %d", n, MostElements)
	}
	o := &Order{n: n, below: sets(n), above: sets(n)}
	for i := range n {
		w.Poll()
		for j := range n {
			if i != j && atMost(i, j) {
				o.below[j].put(i)
				o.above[i].put(j)
			}
		}
	}
	for j := range n {
		w.Poll()
		for _, i := range o.below[j].elements() {
			if o.below[i].has(j) {
				return nil, algebra.Errorf(algebra.Invalid, "not a partial order: %d <= %d and %d <= %d, and they are distinct", i, j, j, i)
			}
			if !o.below[i].within(o.below[j]) {
				for _, h := range o.below[i].elements() {
					if !o.below[j].has(h) {
						return nil, algebra.Errorf(algebra.Invalid, "not a partial order: %d <= %d and %d <= %d, but not %d <= %d", h, i, i, j, h, j)
					}
				}
			}
		}
	}
	o.cover(w)
	o.extend(w)
	return o, nil
}

func sets(n int) []set {
	k := (n + 63) / 64
	all := make(set, n*k)
	list := make([]set, n)
	for i := range list {
		list[i] = all[i*k : (i+1)*k : (i+1)*k]
	}
	return list
}

// cover finds the pairs i < j with nothing between them.
func (o *Order) cover(w *algebra.Work) {
	o.lower, o.upper = make([][]int, o.n), make([][]int, o.n)
	for j := range o.n {
		w.Poll()
		for _, i := range o.below[j].elements() {
			if !o.above[i].meets(o.below[j]) {
				o.lower[j] = append(o.lower[j], i)
				o.upper[i] = append(o.upper[i], j)
			}
		}
	}
}

// extend finds the ranks and from them the linear extension: by rank, and the
// elements of one rank by number.
func (o *Order) extend(w *algebra.Work) {
	// An element has more elements below it than any of those has.
	bySize := make([][]int, o.n+1)
	for j := range o.n {
		k := o.below[j].size()
		bySize[k] = append(bySize[k], j)
	}
	o.rank = make([]int, o.n)
	for _, list := range bySize {
		w.Poll()
		for _, j := range list {
			for _, i := range o.lower[j] {
				o.rank[j] = max(o.rank[j], o.rank[i]+1)
			}
		}
	}
	for _, list := range o.Levels() {
		o.line = append(o.line, list...)
	}
}

// Len is the number of elements.
func (o *Order) Len() int { return o.n }

// AtMost says whether i <= j.
func (o *Order) AtMost(i, j int) bool { return i == j || o.below[j].has(i) }

// Below is the list of the elements less than j, in increasing order of their
// numbers.
func (o *Order) Below(j int) []int { return o.below[j].elements() }

// Above is the list of the elements greater than i, in increasing order of
// their numbers.
func (o *Order) Above(i int) []int { return o.above[i].elements() }

// Cover is a pair Lower < Upper with nothing between them: an edge of the
// Hasse diagram.
type Cover struct{ Lower, Upper int }

// Covers is the list of all covers, in the order of Upper and then of Lower:
// the transitive reduction of the order [AGU].
func (o *Order) Covers() []Cover {
	var list []Cover
	for j, lower := range o.lower {
		for _, i := range lower {
			list = append(list, Cover{i, j})
		}
	}
	return list
}

// LowerCovers is the list of the elements that j covers, in increasing order of
// their numbers.
func (o *Order) LowerCovers(j int) []int { return append([]int(nil), o.lower[j]...) }

// UpperCovers is the list of the elements that cover i, in increasing order of
// their numbers.
func (o *Order) UpperCovers(i int) []int { return append([]int(nil), o.upper[i]...) }

// Minimal is the list of the elements with nothing below them.
func (o *Order) Minimal() []int { return o.extremal(o.lower) }

// Maximal is the list of the elements with nothing above them.
func (o *Order) Maximal() []int { return o.extremal(o.upper) }

func (o *Order) extremal(next [][]int) []int {
	var list []int
	for i := range o.n {
		if len(next[i]) == 0 {
			list = append(list, i)
		}
	}
	return list
}

// Rank is the length of the longest chain from a minimal element up to i: 0
// for a minimal element.
func (o *Order) Rank(i int) int { return o.rank[i] }

// Height is the length of the longest chain, one less than its number of
// elements; -1 for the empty set.
func (o *Order) Height() int {
	h := -1
	for _, r := range o.rank {
		h = max(h, r)
	}
	return h
}

// Levels is the list of the elements of each rank, from 0 up.
func (o *Order) Levels() [][]int {
	list := make([][]int, o.Height()+1)
	for i, r := range o.rank {
		list[r] = append(list[r], i)
	}
	return list
}

// IsGraded says whether all maximal chains have the same length [Stanley,
// section 3.1]. Otherwise the evidence names what breaks it: a cover that skips
// a rank, or a maximal element below the top rank.
func (o *Order) IsGraded() algebra.Verdict {
	for _, c := range o.Covers() {
		if o.rank[c.Upper] != o.rank[c.Lower]+1 {
			v := algebra.Because(false, "a cover leads from rank %d to rank %d", o.rank[c.Lower], o.rank[c.Upper])
			v.Evidence = v.Evidence.With("lower", c.Lower).With("upper", c.Upper)
			return v
		}
	}
	h := o.Height()
	for _, i := range o.Maximal() {
		if o.rank[i] != h {
			v := algebra.Because(false, "a maximal element has rank %d, and the longest chain has length %d", o.rank[i], h)
			v.Evidence = v.Evidence.With("maximal", i)
			return v
		}
	}
	return algebra.Because(true, "every cover raises the rank by 1, and all maximal elements have rank %d", h)
}

// LinearExtension is the list of all elements, each after those below it: by
// rank, and those of one rank by number.
func (o *Order) LinearExtension() []int { return append([]int(nil), o.line...) }

// Mobius is the Möbius function mu(i, j) of the order [Stanley, section 3.7]:
// 0 unless i <= j.
func (o *Order) Mobius(w *algebra.Work, i, j int) *big.Int {
	if !o.AtMost(i, j) {
		return new(big.Int)
	}
	mu := map[int]*big.Int{}
	for _, k := range o.line {
		if !o.AtMost(i, k) || !o.AtMost(k, j) {
			continue
		}
		w.Poll()
		s := new(big.Int)
		if k == i {
			s.SetInt64(1)
		}
		for _, h := range o.Below(k) {
			if m := mu[h]; m != nil {
				s.Sub(s, m)
			}
		}
		mu[k] = s
	}
	return mu[j]
}

// Meet is the greatest element below both i and j, itself allowed; false when
// there is none.
func (o *Order) Meet(i, j int) (int, bool) { return o.bound(i, j, o.below) }

// Join is the least element above both i and j, itself allowed; false when
// there is none.
func (o *Order) Join(i, j int) (int, bool) { return o.bound(i, j, o.above) }

// bound is the common element of two sides, each with its own element, that
// has all the others on its side.
func (o *Order) bound(i, j int, side []set) (int, bool) {
	common := make(set, len(side[i]))
	a, b := append(set(nil), side[i]...), append(set(nil), side[j]...)
	a.put(i)
	b.put(j)
	for k := range common {
		common[k] = a[k] & b[k]
	}
	total := common.size()
	for _, k := range common.elements() {
		if side[k].size() == total-1 && side[k].within(common) {
			return k, true
		}
	}
	return 0, false
}
