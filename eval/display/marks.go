package display

import "math"

// placesOnEdge are where the label of an edge may stand, as the part of the
// way upwards between the two boxes, best first.
var placesOnEdge = []float64{0.5, 0.42, 0.58, 0.34, 0.66, 0.27, 0.73, 0.2, 0.8}

// mark puts the labels on the edges. All the edges between two levels prefer
// one common place, the one with the fewest collisions; a label that still
// collides with an edge, a label or a box then moves by itself.
func (pic *drawing) mark(edges []link) {
	type gap struct{ top, bottom float64 }
	byGap := map[gap][]int{}
	var gaps []gap
	for k, e := range edges {
		if e.label == "" {
			continue
		}
		p := pic.lines[k].points
		h := gap{p[len(p)-1].y, p[0].y}
		if byGap[h] == nil {
			gaps = append(gaps, h)
		}
		byGap[h] = append(byGap[h], k)
	}
	for _, h := range gaps {
		list := byGap[h]
		best, least := 0, math.Inf(1)
		for c := range placesOnEdge {
			cost := 0.0
			var trial []mark
			for _, k := range list {
				m := pic.markAt(edges, k, placesOnEdge[c])
				cost += pic.collisions(m, k, trial) + pic.collisions(m, k, pic.marks)
				trial = append(trial, m)
			}
			if cost < least {
				best, least = c, cost
			}
		}
		first := len(pic.marks)
		for _, k := range list {
			pic.marks = append(pic.marks, pic.markAt(edges, k, placesOnEdge[best]))
		}
		for range 3 {
			for n, k := range list {
				own := first + n
				others := append(append([]mark{}, pic.marks[:own]...), pic.marks[own+1:]...)
				least := pic.collisions(pic.marks[own], k, others)
				for _, t := range placesOnEdge {
					if least == 0 {
						break
					}
					m := pic.markAt(edges, k, t)
					if cost := pic.collisions(m, k, others); cost < least {
						pic.marks[own], least = m, cost
					}
				}
			}
		}
	}
}

// markAt is the label of edge k at part t of its way.
func (pic *drawing) markAt(edges []link, k int, t float64) mark {
	line := pic.lines[k]
	p := line.points
	// Between the boxes, on the middle segment of an edge that passes levels.
	i := (len(p) - 1) / 2
	a, b := p[i], p[i+1]
	bottom, top := a.y, b.y
	if i == 0 {
		bottom -= pic.boxHeight() / 2
	}
	if i == len(p)-2 {
		top += pic.boxHeight() / 2
	}
	y := bottom + float64((top-bottom)*t)
	x := a.x
	if a.y != b.y {
		x += float64((b.x - a.x) * ((y - a.y) / (b.y - a.y)))
	}
	text := runs(edges[k].label)
	return mark{
		center: point{tenth(x), tenth(y)}, width: tenth(runsWidth(text, markSize) + 5), height: markSize + 2.5,
		text: text, edge: k, color: line.color,
	}
}

func (pic *drawing) boxHeight() float64 {
	if len(pic.boxes) == 0 {
		return 0
	}
	return pic.boxes[0].height
}

// collisions weighs what the patch of m would cover: other edges, whose
// course the reader follows, other labels, and boxes.
func (pic *drawing) collisions(m mark, edge int, others []mark) float64 {
	cost := 0.0
	for k, line := range pic.lines {
		if k == edge {
			continue
		}
		for i := 1; i < len(line.points); i++ {
			if segmentMeets(line.points[i-1], line.points[i], m.center, m.width/2+1.5, m.height/2+1.5) {
				cost += 1
			}
		}
	}
	for _, o := range others {
		if overlap(m.center, m.width+2, m.height+2, o.center, o.width, o.height) {
			cost += 3
		}
	}
	for _, b := range pic.boxes {
		if overlap(m.center, m.width+2, m.height+2, b.center, b.width, b.height) {
			cost += 5
		}
	}
	return cost
}

func overlap(a point, aw, ah float64, b point, bw, bh float64) bool {
	return math.Abs(a.x-b.x)*2 < aw+bw && math.Abs(a.y-b.y)*2 < ah+bh
}

// segmentMeets says whether the segment from a to b meets the rectangle of
// half sizes hw and hh about c.
func segmentMeets(a, b, c point, hw, hh float64) bool {
	lo, hi := 0.0, 1.0
	for _, s := range [2][3]float64{{a.x - c.x, b.x - a.x, hw}, {a.y - c.y, b.y - a.y, hh}} {
		from, along, half := s[0], s[1], s[2]
		if along == 0 {
			if math.Abs(from) > half {
				return false
			}
			continue
		}
		t, u := (-half-from)/along, (half-from)/along
		lo, hi = max(lo, min(t, u)), min(hi, max(t, u))
	}
	return lo < hi
}
