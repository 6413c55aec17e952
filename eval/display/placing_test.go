package display

import (
	"math"
	"math/rand/v2"
	"testing"
)

// The places keep their distances, and no small move that keeps them too costs
// less: the problem is convex, so that makes them the best.
func TestPlacesAreBest(t *testing.T) {
	const seed = 30
	random := rand.New(rand.NewPCG(seed, 0))
	for n := range 40 {
		g := newGrid(randomGraded(random, 4, 5).layered())
		g.arrange()
		width := make([]float64, len(g.level))
		for i := range width {
			width[i] = 20 + float64(random.IntN(50))
		}
		const gap = 10
		x := g.place(width, gap)
		feasible := func(x []float64) bool {
			for _, level := range g.levels {
				for k := 1; k < len(level); k++ {
					a, b := level[k-1], level[k]
					if x[b]-x[a] < (width[a]+width[b])/2+gap-1e-6 {
						return false
					}
				}
			}
			return true
		}
		if !feasible(x) {
			t.Fatalf("seed %d, case %d: items overlap", seed, n)
		}
		least := g.cost(x)
		for range 2000 {
			y := append([]float64{}, x...)
			step := math.Exp2(float64(random.IntN(8) - 4))
			for i := range y {
				if random.IntN(3) == 0 {
					y[i] += step * (random.Float64() - 0.5)
				}
			}
			if feasible(y) && g.cost(y) < least-0.01*(1+least)*1e-2 {
				t.Fatalf("seed %d, case %d: a move of %g takes the cost from %g to %g", seed, n, step, least, g.cost(y))
			}
		}
	}
}

// The edges of one prime are parallel in a product of chains that has room.
func TestEdgesOfOneClassAreParallel(t *testing.T) {
	for _, n := range []int{12, 24, 36, 60, 360} {
		d := divisorLattice(n)
		pic := d.draw()
		shift := map[string]float64{}
		for k, e := range d.layered().edges {
			p := pic.lines[k].points
			dx := p[1].x - p[0].x
			if first, known := shift[e.label]; !known {
				shift[e.label] = dx
			} else if math.Abs(dx-first) > 0.2 {
				t.Errorf("in the lattice of %d the edges of %s go %g and %g sideways", n, e.label, first, dx)
			}
		}
	}
}

func TestDrawingHasRoom(t *testing.T) {
	for _, n := range []int{1, 2, 12, 30, 36, 60, 210, 360, 720, 5040} {
		pic := divisorLattice(n).draw()
		inside := func(c point, w, h float64) bool {
			return c.x-w/2 >= 0 && c.y-h/2 >= 0 && c.x+w/2 <= pic.width && c.y+h/2 <= pic.height
		}
		for i, a := range pic.boxes {
			if !inside(a.center, a.width, a.height) {
				t.Errorf("%d: box %d leaves the page", n, i)
			}
			if runsWidth(a.label, labelSize) > a.width-padX || runsWidth(a.sub, subSize) > a.width-padX {
				t.Errorf("%d: the text of box %d does not fit", n, i)
			}
			for _, b := range pic.boxes[:i] {
				if overlap(a.center, a.width, a.height, b.center, b.width, b.height) {
					t.Errorf("%d: boxes overlap", n)
				}
			}
		}
		for i, m := range pic.marks {
			if !inside(m.center, m.width, m.height) {
				t.Errorf("%d: label %d leaves the page", n, i)
			}
			for _, b := range pic.boxes {
				if overlap(m.center, m.width, m.height, b.center, b.width, b.height) {
					t.Errorf("%d: label %d overlaps a box", n, i)
				}
			}
			for _, o := range pic.marks[:i] {
				if overlap(m.center, m.width, m.height, o.center, o.width, o.height) {
					t.Errorf("%d: labels of edges overlap", n)
				}
			}
			if n < 720 && pic.collisions(m, m.edge, nil) > 0 {
				t.Errorf("%d: label %d covers another edge", n, i)
			}
		}
	}
}

func TestSegmentMeets(t *testing.T) {
	c := point{0, 0}
	for _, s := range []struct {
		a, b point
		want bool
	}{
		{point{-5, 0}, point{5, 0}, true}, {point{0, -5}, point{0, 5}, true}, {point{-5, 2}, point{5, 2}, false},
		{point{-5, -5}, point{5, 5}, true}, {point{-5, -1}, point{-3, 1}, false}, {point{-3, -3}, point{3, 1.5}, true}, {point{0.5, 0.2}, point{0.6, 0.3}, true},
	} {
		if segmentMeets(s.a, s.b, c, 2, 1) != s.want {
			t.Errorf("segment %v to %v: want %v", s.a, s.b, s.want)
		}
	}
}
