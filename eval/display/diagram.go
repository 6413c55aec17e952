package display

// Node is one element of an ordered set.
type Node struct {
	ID    string // what edges call it; unique in the diagram
	Label string // in the notation of labels, such as F_{2^12}
	Sub   string // a smaller second line, such as the generator; may be empty
	Rank  int    // its level; larger is higher, only the order of ranks counts
	Emph  bool   // drawn stronger
}

// Edge joins a node to one that covers it.
type Edge struct {
	From  string // ID of the lower node
	To    string // ID of the upper node
	Label string // on the edge, such as the relative degree; may be empty
}

// Diagram is the Hasse diagram of a graded ordered set: one level for each
// rank, the largest on top. Edges that name no node are left out.
type Diagram struct {
	Title   string // what it is, in a few words; not drawn
	Caption string // stands under the figure
	Nodes   []Node
	Edges   []Edge
}

// Largest diagram that is drawn; a larger one has its outline only, since no
// page would hold it.
const (
	mostNodes = 200
	mostEdges = 1000
)

// Bundle has the figure as an outline, as an image in HTML, as SVG and as PDF.
func (d Diagram) Bundle() Bundle {
	b := Bundle{Data: map[string]any{MIMEText: d.Text()}}
	if len(d.Nodes) == 0 || len(d.Nodes) > mostNodes || len(d.Edges) > mostEdges {
		return b
	}
	pic := d.draw()
	svg := d.svg(pic)
	b.Data[MIMESVG] = svg
	b.Data[MIMEHTML] = d.html(svg)
	if pdf, err := d.pdf(pic); err == nil {
		b.Data[MIMEPDF] = pdf
	}
	return b
}
