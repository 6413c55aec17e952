package display

import (
	"math"
	"slices"
)

// drawing is the picture of a diagram, in points from the upper left corner.
// SVG and PDF write down the same drawing.
type drawing struct {
	width, height float64
	lines         []polyline
	marks         []mark
	boxes         []box
}

type point struct{ x, y float64 }

type polyline struct {
	points []point
	color  string
}

// mark is the label of an edge on a patch of background.
type mark struct {
	center point
	width  float64
	height float64
	text   []run
	edge   int // which of the edges
	color  string
}

// box is a node.
type box struct {
	center        point
	width, height float64
	label, sub    []run
	emph          bool
}

// Sizes of the drawing, in points.
const (
	labelSize  = 15.0
	subSize    = 11.5
	markSize   = 11.5
	padX, padY = 10.0, 6.0
	boxGap     = 22.0
	leastWidth = 34.0
	marginSize = 10.0
	cornerSize = 5.0
	roomy      = 900.0 // up to this width the levels are evenly spaced at any cost
)

// Colours: dark on light, each with a contrast of more than 4.5 to 1.
const (
	background  = "#ffffff"
	ink         = "#111827"
	softInk     = "#4b5563"
	boxFill     = "#f8fafc"
	emphFill    = "#e8eef7"
	boxLine     = "#94a3b8"
	emphLine    = "#1e3a5f"
	neutralEdge = "#64748b"
)

// edgeColors are given to the labels of the edges in the order of first use,
// when there is more than one; the label says the same as the colour. They
// differ in lightness too, for readers who do not tell the hues apart.
var edgeColors = []string{"#1d4e89", "#b1400a", "#1f7a4d", "#7b2d8e", "#7a5c00", "#0e7490"}

// draw lays the diagram out and measures everything.
func (d Diagram) draw() drawing {
	l := d.layered()
	g := newGrid(l)
	g.arrange()

	boxes := d.boxes()
	width := slots(g, boxes)
	x := g.place(width, boxGap)

	var pic drawing
	height := 0.0
	left, right := math.Inf(1), math.Inf(-1)
	for i := range boxes {
		height = max(height, boxes[i].height)
	}
	for i := range x {
		half := 0.0
		if i < len(boxes) {
			half = boxes[i].width / 2
		}
		left, right = min(left, x[i]-half), max(right, x[i]+half)
	}
	y := levelHeights(g, x, height)
	if len(boxes) == 0 {
		left, right = 0, 0
	}
	pic.width = math.Ceil(right - left + 2*marginSize)
	pic.height = math.Ceil(height + 2*marginSize)
	if len(y) > 0 {
		pic.height = math.Ceil(y[len(y)-1] + height + 2*marginSize)
	}
	at := func(i int) point {
		return point{tenth(x[i] - left + marginSize), tenth(pic.height - marginSize - height/2 - y[g.level[i]])}
	}
	for i := range boxes {
		boxes[i].center = at(i)
	}
	pic.boxes = boxes

	colors := edgeColoring(l.edges)
	for k, path := range g.paths {
		line := polyline{color: colors[l.edges[k].label]}
		for _, i := range path {
			line.points = append(line.points, at(i))
		}
		pic.lines = append(pic.lines, line)
	}
	pic.mark(l.edges)
	return pic
}

// boxes measures the nodes. They all get the width of the widest, unless that
// is far wider than most.
func (d Diagram) boxes() []box {
	boxes := make([]box, len(d.Nodes))
	var widths []float64
	twoLines := slices.ContainsFunc(d.Nodes, func(n Node) bool { return n.Sub != "" })
	for i, n := range d.Nodes {
		b := box{label: runs(n.Label), emph: n.Emph}
		w := runsWidth(b.label, labelSize)
		b.height = labelSize*1.2 + 2*padY
		if n.Sub != "" {
			b.sub = runs(n.Sub)
			w = max(w, runsWidth(b.sub, subSize))
		}
		if twoLines {
			b.height += subSize*1.25 + 5
		}
		b.width = max(leastWidth, math.Ceil(float64(w*1.06)+2*padX))
		boxes[i] = b
		widths = append(widths, b.width)
	}
	if len(boxes) == 0 {
		return boxes
	}
	slices.Sort(widths)
	widest, middle := widths[len(widths)-1], widths[len(widths)/2]
	for i := range boxes {
		if widest <= float64(1.6*middle) {
			boxes[i].width = widest
		} else {
			boxes[i].width = max(boxes[i].width, middle)
		}
	}
	return boxes
}

// slots are the widths that the items of a grid keep free. They are all equal,
// so that every level is evenly spaced, unless that takes too much room.
func slots(g *grid, boxes []box) []float64 {
	widest, most := 0.0, 0
	for _, b := range boxes {
		widest = max(widest, b.width)
	}
	for _, level := range g.levels {
		most = max(most, len(level))
	}
	width := make([]float64, len(g.level))
	for i := range width {
		switch {
		case float64(most)*(widest+boxGap) <= roomy || i < len(boxes) && boxes[i].width == widest:
			width[i] = widest
		case i < len(boxes):
			width[i] = boxes[i].width
		}
	}
	return width
}

// levelHeights puts the levels above one another, further apart where steps
// go far sideways: they would run flat otherwise.
func levelHeights(g *grid, x []float64, height float64) []float64 {
	y := make([]float64, len(g.levels))
	for r := 1; r < len(g.levels); r++ {
		far, steps := 0.0, 0
		for _, i := range g.levels[r] {
			for _, j := range g.down[i] {
				far = max(far, math.Abs(x[i]-x[j]))
				steps++
			}
		}
		gap := 46 + float64(0.14*far)
		if steps > 10 {
			gap += 8
		}
		y[r] = y[r-1] + height + math.Ceil(min(gap, 170))
	}
	return y
}

// edgeColoring gives a colour to each label. With one label only, or more
// than there are colours, all edges are neutral.
func edgeColoring(edges []link) map[string]string {
	var labels []string
	for _, e := range edges {
		if !slices.Contains(labels, e.label) {
			labels = append(labels, e.label)
		}
	}
	slices.SortFunc(labels, compareLabels)
	colors := map[string]string{}
	for i, s := range labels {
		colors[s] = neutralEdge
		if len(labels) > 1 && len(labels) <= len(edgeColors) && s != "" {
			colors[s] = edgeColors[i]
		}
	}
	return colors
}

// compareLabels puts shorter labels first, so that numbers come in order.
func compareLabels(a, b string) int {
	if len(a) != len(b) {
		return len(a) - len(b)
	}
	if a < b {
		return -1
	}
	if a > b {
		return 1
	}
	return 0
}

func tenth(x float64) float64 { return math.Round(x*10) / 10 }
