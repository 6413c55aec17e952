package display

import (
	"math"
	"math/rand/v2"
	"slices"
)

// References:
//   K. Sugiyama, S. Tagawa, M. Toda, Methods for visual understanding of
//     hierarchical system structures, IEEE Trans. Systems, Man, and
//     Cybernetics 11 (1981): levels, barycentres, crossings.
//   C. Matuszewski, R. Schönfeld, P. Molitor, Using sifting for k-layer
//     straightline crossing minimization, Graph Drawing 1999.
// The exact search over all permutations of all levels is the principle of
// optimality (R. Bellman, Dynamic Programming, 1957): the best orders of the
// levels up to one depend on the rest only through the order of that level.

// The weight of an order is the number of crossings and, among orders with
// equally many, how far the steps go sideways when every level is centred.
const crossingWeight = 1 << 32

// exactWidth is the most items of a level whose permutations are all tried:
// two neighbouring levels of it take 720 * 720 steps.
const exactWidth = 6

// restarts is how many starting orders the search tries where it is not exact.
const restarts = 48

// arrange puts the levels in an order of least weight: exactly when no level
// has more than exactWidth items, else the best that a local search from many
// starting orders finds. Among equals the order given first wins.
func (g *grid) arrange() {
	width := 0
	for _, level := range g.levels {
		width = max(width, len(level))
	}
	if width <= exactWidth {
		g.levels = g.exact()
	} else {
		g.levels = g.search()
	}
}

// weight of an order of all levels.
func (g *grid) weight(order [][]int) int {
	pos := g.positions(order)
	total := g.crossings(order) * crossingWeight
	for i, list := range g.up {
		for _, j := range list {
			total += g.sideways(order, pos[i], i, pos[j], j)
		}
	}
	return total
}

// sideways is the squared distance, in half columns, between the places a of
// item i and b of item j.
func (g *grid) sideways(order [][]int, a, i, b, j int) int {
	d := 2*a - len(order[g.level[i]]) - 2*b + len(order[g.level[j]])
	return d * d
}

// exact finds an order of least weight over all permutations of all levels.
func (g *grid) exact() [][]int {
	type state struct {
		weight []int // by permutation of this level, in lexicographic order
		from   []int // the best permutation of the level before
	}
	states := make([]state, len(g.levels))
	order := cloneOrder(g.levels)
	for r, level := range g.levels {
		n := factorial(len(level))
		s := state{make([]int, n), make([]int, n)}
		if r > 0 {
			for i := range s.weight {
				s.weight[i] = math.MaxInt
			}
			permutations(g.levels[r-1], func(number int, before []int) {
				order[r-1] = before
				t := g.tableau(order, r, true, false)
				t.each(states[r-1].weight[number], func(k, weight int) {
					if weight < s.weight[k] {
						s.weight[k], s.from[k] = weight, number
					}
				})
			})
		}
		states[r] = s
	}
	best := slices.Index(states[len(states)-1].weight, slices.Min(states[len(states)-1].weight))
	for r := len(g.levels) - 1; r >= 0; r-- {
		order[r] = permutation(g.levels[r], best)
		best = states[r].from[best]
	}
	return order
}

// search improves orders level by level until none gets better.
func (g *grid) search() [][]int {
	random := rand.New(rand.NewPCG(1, 2)) // the same stream in every run
	var best [][]int
	least := math.MaxInt
	for try := range restarts {
		order := cloneOrder(g.levels)
		if try > 0 {
			for _, level := range order {
				random.Shuffle(len(level), func(i, j int) { level[i], level[j] = level[j], level[i] })
			}
		}
		g.barycentres(order)
		g.improve(order)
		if w := g.weight(order); w < least {
			best, least = order, w
		}
	}
	return best
}

// barycentres sorts each level by the mean place of its neighbours, upwards
// and downwards.
func (g *grid) barycentres(order [][]int) {
	sweep := func(r int, near [][]int) {
		pos := g.positions(order)
		mean := func(i int) float64 {
			if len(near[i]) == 0 {
				return float64(pos[i])
			}
			sum := 0
			for _, j := range near[i] {
				sum += pos[j]
			}
			return float64(sum) / float64(len(near[i]))
		}
		slices.SortStableFunc(order[r], func(i, j int) int {
			if a, b := mean(i), mean(j); a < b {
				return -1
			} else if a > b {
				return 1
			}
			return 0
		})
	}
	for range 3 {
		for r := 1; r < len(order); r++ {
			sweep(r, g.down)
		}
		for r := len(order) - 2; r >= 0; r-- {
			sweep(r, g.up)
		}
	}
}

// improve reorders one level after the other, the others fixed, until that
// helps nowhere.
func (g *grid) improve(order [][]int) {
	for better := true; better; {
		better = false
		for step := range 2 * len(order) {
			r := step
			if r >= len(order) {
				r = 2*len(order) - 1 - step
			}
			t := g.tableau(order, r, true, true)
			if t.sift() {
				order[r] = t.items()
				better = true
			}
		}
	}
}

// tableau has what an order of one level weighs while the others stay.
type tableau struct {
	level []int
	order []int   // places in level: a permutation of 0..n-1
	pair  [][]int // pair[i][j]: weight of the crossings when level[i] is left of level[j]
	place [][]int // place[i][k]: weight of level[i] at place k
}

// tableau weighs level r against the level before, the next one, or both.
func (g *grid) tableau(order [][]int, r int, before, after bool) *tableau {
	level := order[r]
	n := len(level)
	t := &tableau{level: slices.Clone(level), order: make([]int, n), pair: make([][]int, n), place: make([][]int, n)}
	pos := g.positions(order)
	for a, i := range level {
		t.order[a] = a
		t.pair[a] = make([]int, n)
		t.place[a] = make([]int, n)
		for side, near := range [2][][]int{g.down, g.up} {
			if side == 0 && !before || side == 1 && !after {
				continue
			}
			for b, j := range level {
				if a != b {
					t.pair[a][b] += crossingWeight * inversions(near[i], near[j], pos)
				}
			}
			for _, j := range near[i] {
				for k := range n {
					t.place[a][k] += g.sideways(order, k, i, pos[j], j)
				}
			}
		}
	}
	return t
}

// items is the level in the order found.
func (t *tableau) items() []int {
	list := make([]int, len(t.order))
	for k, a := range t.order {
		list[k] = t.level[a]
	}
	return list
}

// exchange is the change of weight when the items at places k and k+1 change
// places.
func (t *tableau) exchange(k int) int {
	a, b := t.order[k], t.order[k+1]
	return t.pair[b][a] - t.pair[a][b] + t.place[b][k] - t.place[b][k+1] + t.place[a][k+1] - t.place[a][k]
}

// sift moves each item to its best place until none gets lighter. It reports
// whether anything moved.
func (t *tableau) sift() bool {
	moved := false
	for better := true; better; {
		better = false
		for a := range t.order {
			if t.siftOne(a) {
				better, moved = true, true
			}
		}
	}
	return moved
}

// siftOne carries item a to the left end, then to the right end, and back to
// the first place where the level weighed least.
func (t *tableau) siftOne(a int) bool {
	start := slices.Index(t.order, a)
	change, least, best := 0, 0, start
	step := func(k int) {
		change += t.exchange(k)
		t.order[k], t.order[k+1] = t.order[k+1], t.order[k]
	}
	at := start
	for ; at > 0; at-- {
		step(at - 1)
		if change < least {
			least, best = change, at-1
		}
	}
	for ; at < len(t.order)-1; at++ {
		step(at)
		if change < least {
			least, best = change, at+1
		}
	}
	for ; at > best; at-- {
		step(at - 1)
	}
	return best != start
}

// each calls yield with the number and the weight, added to base, of every
// permutation of the level in lexicographic order.
func (t *tableau) each(base int, yield func(number, weight int)) {
	n := len(t.level)
	number := 0
	used := make([]bool, n)
	prefix := make([]int, 0, n)
	var extend func(weight int)
	extend = func(weight int) {
		if len(prefix) == n {
			yield(number, weight)
			number++
			return
		}
		for a := range n {
			if used[a] {
				continue
			}
			w := weight + t.place[a][len(prefix)]
			for _, b := range prefix {
				w += t.pair[b][a]
			}
			used[a] = true
			prefix = append(prefix, a)
			extend(w)
			prefix = prefix[:len(prefix)-1]
			used[a] = false
		}
	}
	extend(base)
}

// permutations calls yield with every permutation of list in lexicographic
// order of places.
func permutations(list []int, yield func(number int, p []int)) {
	for k := range factorial(len(list)) {
		yield(k, permutation(list, k))
	}
}

// permutation is the k-th permutation of list in lexicographic order of places.
func permutation(list []int, k int) []int {
	rest := slices.Clone(list)
	var p []int
	for len(rest) > 0 {
		f := factorial(len(rest) - 1)
		i := k / f
		k %= f
		p = append(p, rest[i])
		rest = slices.Delete(rest, i, i+1)
	}
	return p
}

func factorial(n int) int {
	f := 1
	for i := 2; i <= n; i++ {
		f *= i
	}
	return f
}

func cloneOrder(order [][]int) [][]int {
	c := make([][]int, len(order))
	for r := range order {
		c[r] = slices.Clone(order[r])
	}
	return c
}
