package display

import (
	"fmt"
	"slices"
	"strings"
)

// Text is the diagram as an outline that reads well aloud: the levels from the
// top, each node with what it covers.
func (d Diagram) Text() string {
	var b strings.Builder
	if d.Title != "" {
		b.WriteString(oneLine(d.Title) + "\n")
	}
	l := d.layered()
	for r := l.levels - 1; r >= 0; r-- {
		fmt.Fprintf(&b, "level %d:\n", r)
		for i, n := range d.Nodes {
			if l.level[i] != r {
				continue
			}
			b.WriteString("  " + plain(n.Label))
			if n.Sub != "" {
				b.WriteString(" (" + plain(n.Sub) + ")")
			}
			var below []string
			for _, e := range l.edges {
				if e.upper == i {
					text := plain(d.Nodes[e.lower].Label)
					if e.label != "" {
						text += " [" + plain(e.label) + "]"
					}
					below = append(below, text)
				}
			}
			if below != nil {
				b.WriteString(" above " + strings.Join(below, ", "))
			}
			b.WriteString("\n")
		}
	}
	return strings.TrimRight(b.String(), "\n")
}

// layered is a diagram with its ranks counted from 0 without gaps and its
// edges by the numbers of the nodes.
type layered struct {
	level  []int // by node
	levels int
	edges  []link
}

// link is an edge between two nodes on different levels.
type link struct {
	lower, upper int
	label        string
}

// layered reads the ranks and edges. An edge that was given from the higher to
// the lower node is turned; one within a level or to an unknown node is left
// out.
func (d Diagram) layered() layered {
	ranks := make([]int, len(d.Nodes))
	number := map[string]int{}
	for i, n := range d.Nodes {
		ranks[i] = n.Rank
		if _, known := number[n.ID]; !known {
			number[n.ID] = i
		}
	}
	slices.Sort(ranks)
	ranks = slices.Compact(ranks)
	l := layered{level: make([]int, len(d.Nodes)), levels: len(ranks)}
	for i, n := range d.Nodes {
		l.level[i], _ = slices.BinarySearch(ranks, n.Rank)
	}
	for _, e := range d.Edges {
		a, ok := number[e.From]
		b, too := number[e.To]
		if !ok || !too || l.level[a] == l.level[b] {
			continue
		}
		if l.level[a] > l.level[b] {
			a, b = b, a
		}
		l.edges = append(l.edges, link{a, b, e.Label})
	}
	return l
}
