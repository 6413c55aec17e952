package display

import "math"

// References:
//   E. R. Gansner, E. Koutsofios, S. C. North, K.-P. Vo, A technique for
//     drawing directed graphs, IEEE Trans. Software Engineering 19 (1993),
//     section 4: the places on the levels as a problem of least cost.
//   R. E. Barlow, D. J. Bartholomew, J. M. Bremner, H. D. Brunk, Statistical
//     Inference under Order Restrictions (1972): pooling adjacent violators.
//
// The cost here is the sum of the squared sideways distances of the steps. It
// draws the edges of a product of chains parallel, level by level in classes,
// and it keeps every symmetry that the order of the levels has.

// Steps of edges that pass a level count more, so that such edges stay straight.
const (
	plainStep   = 1.0
	passingStep = 4.0
)

// place finds the horizontal centre of every item: neighbours on a level are
// at least as far apart as their widths and gap ask for, and the squared
// sideways distances of the steps are least. Products are rounded before they
// are added, so that no processor fuses the two and gets other digits.
func (g *grid) place(width []float64, gap float64) []float64 {
	x := make([]float64, len(g.level))
	offsets := make([][]float64, len(g.levels))
	for r, level := range g.levels {
		offsets[r] = make([]float64, len(level))
		for k := 1; k < len(level); k++ {
			a, b := level[k-1], level[k]
			offsets[r][k] = offsets[r][k-1] + (width[a]+width[b])/2 + gap
		}
		for k, i := range level {
			x[i] = offsets[r][k] - offsets[r][len(level)-1]/2
		}
	}
	for range 4000 {
		moved := 0.0
		for r := range g.levels {
			moved = max(moved, g.relax(r, offsets[r], x))
		}
		for r := len(g.levels) - 2; r >= 0; r-- {
			moved = max(moved, g.relax(r, offsets[r], x))
		}
		if moved < 1e-5 {
			break
		}
	}
	return g.snap(x, width, gap)
}

// snapTolerance is how much worse places on half columns may be.
const snapTolerance = 1.1

// snap moves all items to half columns when every item is equally wide and
// that costs little: edges of one class then are exactly parallel, and a slope
// of a few points, which looks like a mistake, becomes none. Items keep their
// distances, since a column is two half columns. What is symmetric stays so.
func (g *grid) snap(x, width []float64, gap float64) []float64 {
	for _, w := range width {
		if w != width[0] {
			return x
		}
	}
	const starts = 16
	var best []float64
	least := g.cost(x)*snapTolerance + 1
	symmetric := g.symmetric(x)
	for s := range starts {
		half := (width[0] + gap) / 2
		start := x[0] + float64(half*float64(s))/starts
		y := make([]float64, len(x))
		for i := range x {
			y[i] = start + float64(half*math.Round((x[i]-start)/half))
		}
		if c := g.cost(y); c < least-1e-6 && (!symmetric || g.symmetric(y)) {
			best, least = y, c
		}
	}
	if best == nil {
		return x
	}
	return best
}

// cost is the sum of the squared sideways distances.
func (g *grid) cost(x []float64) float64 {
	sum := 0.0
	for i, list := range g.up {
		for _, j := range list {
			w := plainStep
			if i >= g.nodes || j >= g.nodes {
				w = passingStep
			}
			d := x[i] - x[j]
			sum += float64(w * d * d)
		}
	}
	return sum
}

// symmetric says whether one vertical line is the axis of every level.
func (g *grid) symmetric(x []float64) bool {
	axis, known := 0.0, false
	for _, level := range g.levels {
		for k := range level {
			mid := x[level[k]] + x[level[len(level)-1-k]]
			if known && math.Abs(mid-axis) > 0.1 {
				return false
			}
			axis, known = mid, true
		}
	}
	return true
}

// relax places level r best while the other levels stay, and returns the
// longest way that an item moved.
func (g *grid) relax(r int, offset, x []float64) float64 {
	level := g.levels[r]
	// Pooled blocks of items that stand as close as they may.
	type block struct {
		mean, weight float64
		items        int
	}
	var blocks []block
	for k, i := range level {
		sum, weight := 0.0, 0.0
		for _, near := range [2][]int{g.down[i], g.up[i]} {
			for _, j := range near {
				w := plainStep
				if i >= g.nodes || j >= g.nodes {
					w = passingStep
				}
				sum += float64(w * x[j])
				weight += w
			}
		}
		if weight == 0 {
			sum, weight = float64(1e-3*x[i]), 1e-3
		}
		b := block{sum/weight - offset[k], weight, 1}
		for len(blocks) > 0 && blocks[len(blocks)-1].mean >= b.mean {
			a := blocks[len(blocks)-1]
			blocks = blocks[:len(blocks)-1]
			total := a.weight + b.weight
			b = block{(float64(a.mean*a.weight) + float64(b.mean*b.weight)) / total, total, a.items + b.items}
		}
		blocks = append(blocks, b)
	}
	moved := 0.0
	k := 0
	for _, b := range blocks {
		for range b.items {
			i := level[k]
			to := b.mean + offset[k]
			moved = max(moved, math.Abs(to-x[i]))
			x[i] = to
			k++
		}
	}
	return moved
}
