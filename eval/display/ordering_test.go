package display

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// bruteForce is the least number of crossings over all orders of all levels,
// counted by geometry: two straight steps between the same levels cross when
// their ends are in opposite orders.
func bruteForce(g *grid) int {
	best := math.MaxInt
	order := cloneOrder(g.levels)
	var choose func(r int)
	choose = func(r int) {
		if r == len(order) {
			best = min(best, slowCrossings(g, order))
			return
		}
		permutations(g.levels[r], func(_ int, p []int) {
			order[r] = p
			choose(r + 1)
		})
	}
	choose(0)
	return best
}

func slowCrossings(g *grid, order [][]int) int {
	pos := g.positions(order)
	type step struct{ a, b int }
	var steps []step
	for a, list := range g.up {
		for _, b := range list {
			steps = append(steps, step{a, b})
		}
	}
	n := 0
	for i, s := range steps {
		for _, t := range steps[i+1:] {
			if g.level[s.a] == g.level[t.a] && (pos[s.a]-pos[t.a])*(pos[s.b]-pos[t.b]) < 0 {
				n++
			}
		}
	}
	return n
}

func randomGraded(random *rand.Rand, levels, width int) Diagram {
	var d Diagram
	for r := range levels {
		for k := range 1 + random.IntN(width) {
			d.Nodes = append(d.Nodes, Node{ID: fmt.Sprint(r, ",", k), Label: "x", Rank: r})
		}
	}
	for _, a := range d.Nodes {
		for _, b := range d.Nodes {
			if a.Rank < b.Rank && random.IntN(1+b.Rank-a.Rank) == 0 && random.IntN(2) == 0 {
				d.Edges = append(d.Edges, Edge{a.ID, b.ID, ""})
			}
		}
	}
	return d
}

func TestNoAvoidableCrossing(t *testing.T) {
	const seed = 20
	random := rand.New(rand.NewPCG(seed, 0))
	tried := 0
	for tried < 60 {
		g := newGrid(randomGraded(random, 3, 4).layered())
		work := 1
		for _, level := range g.levels {
			work *= factorial(len(level))
		}
		if work > 20000 {
			continue
		}
		tried++
		want := bruteForce(g)
		if got := slowCrossings(g, g.exact()); got != want {
			t.Errorf("seed %d, case %d: the exact order has %d crossings, the least is %d", seed, tried, got, want)
		}
		if got := slowCrossings(g, g.search()); got != want {
			t.Errorf("seed %d, case %d: the order found by search has %d crossings, the least is %d", seed, tried, got, want)
		}
	}
	for _, n := range []int{4, 6, 12, 24, 30, 36} {
		g := newGrid(divisorLattice(n).layered())
		if got, want := slowCrossings(g, g.exact()), bruteForce(g); got != want {
			t.Errorf("the lattice of %d has %d crossings, the least is %d", n, got, want)
		}
	}
}

// The search, which larger diagrams get, is as good as the exact order where
// both can be had.
func TestSearchAgainstExact(t *testing.T) {
	for _, n := range []int{30, 60, 210, 360, 720} {
		g := newGrid(divisorLattice(n).layered())
		exact, found := g.weight(g.exact()), g.weight(g.search())
		if exact > found {
			t.Errorf("the lattice of %d: the exact order weighs %d, the search found %d", n, exact, found)
		}
		if exact/crossingWeight != found/crossingWeight {
			t.Errorf("the lattice of %d: %d crossings by search, %d exactly", n, found/crossingWeight, exact/crossingWeight)
		}
	}
}

// The weight of an order is the same counted in both ways, and sifting reports
// exactly what it gains.
func TestCrossingsAgainstGeometry(t *testing.T) {
	const seed = 21
	random := rand.New(rand.NewPCG(seed, 0))
	for i := range 100 {
		g := newGrid(randomGraded(random, 4, 7).layered())
		if got, want := g.crossings(g.levels), slowCrossings(g, g.levels); got != want {
			t.Fatalf("seed %d, case %d: %d crossings, want %d", seed, i, got, want)
		}
		order := cloneOrder(g.levels)
		before := g.weight(order)
		g.improve(order)
		if after := g.weight(order); after > before {
			t.Fatalf("seed %d, case %d: improving made %d out of %d", seed, i, after, before)
		}
	}
}

func TestPermutations(t *testing.T) {
	var got []string
	permutations([]int{7, 8, 9}, func(k int, p []int) { got = append(got, fmt.Sprint(k, p)) })
	want := "[0 [7 8 9] 1 [7 9 8] 2 [8 7 9] 3 [8 9 7] 4 [9 7 8] 5 [9 8 7]]"
	if fmt.Sprint(got) != want {
		t.Errorf("got %v, want %s", got, want)
	}
}
