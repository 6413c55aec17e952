package display

// grid is a diagram cut into levels, with a place holder on each level that an
// edge passes: every step joins neighbouring levels. Items 0..n-1 are the
// nodes, the further ones place holders.
type grid struct {
	levels [][]int // the items of each level from the left, lowest level first
	level  []int   // by item
	up     [][]int // by item: the items it is joined to on the next level
	down   [][]int // by item: the items it is joined to on the level before
	paths  [][]int // by edge: its items from the lower to the upper node
	nodes  int
}

// newGrid keeps the order in which the nodes are given.
func newGrid(l layered) *grid {
	g := &grid{levels: make([][]int, l.levels), nodes: len(l.level)}
	for _, r := range l.level {
		g.add(r)
	}
	for _, e := range l.edges {
		path := []int{e.lower}
		for r := l.level[e.lower] + 1; r < l.level[e.upper]; r++ {
			path = append(path, g.add(r))
		}
		path = append(path, e.upper)
		for i := 1; i < len(path); i++ {
			a, b := path[i-1], path[i]
			g.up[a] = append(g.up[a], b)
			g.down[b] = append(g.down[b], a)
		}
		g.paths = append(g.paths, path)
	}
	return g
}

func (g *grid) add(level int) int {
	i := len(g.level)
	g.level = append(g.level, level)
	g.up = append(g.up, nil)
	g.down = append(g.down, nil)
	g.levels[level] = append(g.levels[level], i)
	return i
}

// positions are the places of the items within their levels.
func (g *grid) positions(order [][]int) []int {
	pos := make([]int, len(g.level))
	for _, level := range order {
		for k, i := range level {
			pos[i] = k
		}
	}
	return pos
}

// crossings counts the pairs of steps that cross when the levels are in the
// given order.
func (g *grid) crossings(order [][]int) int {
	pos := g.positions(order)
	n := 0
	for _, level := range order {
		for k, i := range level {
			for _, j := range level[k+1:] {
				n += inversions(g.up[i], g.up[j], pos)
			}
		}
	}
	return n
}

// inversions counts the pairs (u, v) of a and b in which u stands to the right
// of v: the crossings among the steps to them when the step to u starts on the
// left.
func inversions(a, b, pos []int) int {
	n := 0
	for _, u := range a {
		for _, v := range b {
			if pos[u] > pos[v] {
				n++
			}
		}
	}
	return n
}
