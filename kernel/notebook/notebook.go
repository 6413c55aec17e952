package notebook

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"errors"
	"fmt"
	"regexp"
	"strconv"
	"strings"
)

// Notebook is a notebook. What this package does not know of is kept as it
// came.
type Notebook struct {
	Cells    []*Cell
	Metadata map[string]any
	rest     map[string]any
}

// Cell is a cell of a notebook.
type Cell struct {
	ID       string
	Kind     string // code, markdown or raw
	Source   string
	Metadata map[string]any
	Outputs  []Output // of a code cell
	Count    int      // of a code cell; 0 when it was not run
	rest     map[string]any
}

// Output is one output of a code cell: a stream, display_data, execute_result
// or error, in the form of the file.
type Output map[string]any

// Read reads a notebook of nbformat 4.
func Read(b []byte) (*Notebook, error) {
	d := json.NewDecoder(bytes.NewReader(b))
	d.UseNumber()
	var raw map[string]any
	if err := d.Decode(&raw); err != nil {
		return nil, fmt.Errorf("not a notebook: %w", err)
	}
	if major, _ := raw["nbformat"].(json.Number); major.String() != "4" {
		return nil, errors.New("not a notebook of format 4; open it in Jupyter and save it to bring it up to date")
	}
	n := &Notebook{rest: raw}
	n.Metadata, _ = raw["metadata"].(map[string]any)
	if n.Metadata == nil {
		n.Metadata = map[string]any{}
	}
	cells, ok := raw["cells"].([]any)
	if !ok {
		return nil, errors.New("not a notebook: it has no cells")
	}
	for i, c := range cells {
		m, ok := c.(map[string]any)
		if !ok {
			return nil, fmt.Errorf("not a notebook: cell %d is no object", i+1)
		}
		n.Cells = append(n.Cells, readCell(m))
	}
	delete(raw, "cells")
	delete(raw, "metadata")
	return n, nil
}

func readCell(m map[string]any) *Cell {
	c := &Cell{rest: m}
	c.ID, _ = m["id"].(string)
	c.Kind, _ = m["cell_type"].(string)
	c.Source = joined(m["source"])
	c.Metadata, _ = m["metadata"].(map[string]any)
	if outputs, ok := m["outputs"].([]any); ok {
		for _, o := range outputs {
			if o, ok := o.(map[string]any); ok {
				c.Outputs = append(c.Outputs, o)
			}
		}
	}
	if n, ok := m["execution_count"].(json.Number); ok {
		c.Count, _ = strconv.Atoi(n.String())
	}
	for _, known := range []string{"id", "cell_type", "source", "metadata", "outputs", "execution_count"} {
		delete(m, known)
	}
	return c
}

// joined is a text that the file may hold as a list of lines.
func joined(v any) string {
	switch v := v.(type) {
	case string:
		return v
	case []any:
		var b strings.Builder
		for _, line := range v {
			s, _ := line.(string)
			b.WriteString(s)
		}
		return b.String()
	}
	return ""
}

// lines is a text as the file holds it: a list of lines with their ends.
func lines(s string) []string {
	l := strings.SplitAfter(s, "\n")
	if l[len(l)-1] == "" {
		l = l[:len(l)-1]
	}
	return l
}

// CodeCells are the cells that can be run.
func (n *Notebook) CodeCells() []*Cell {
	var code []*Cell
	for _, c := range n.Cells {
		if c.Kind == "code" {
			code = append(code, c)
		}
	}
	return code
}

// Tagged says whether the cell has the tag.
func (c *Cell) Tagged(tag string) bool {
	tags, _ := c.Metadata["tags"].([]any)
	for _, t := range tags {
		if t == tag {
			return true
		}
	}
	return false
}

var validID = regexp.MustCompile(`^[a-zA-Z0-9_-]{1,64}$`)

// identify gives an id to each cell that has none, or one that is taken: it
// depends on the cell's place and text.
func (n *Notebook) identify() {
	taken := map[string]bool{}
	for i, c := range n.Cells {
		for try := 0; !validID.MatchString(c.ID) || taken[c.ID]; try++ {
			sum := sha256.Sum256(fmt.Appendf(nil, "%d %d %s %s", i, try, c.Kind, c.Source))
			c.ID = hex.EncodeToString(sum[:4])
		}
		taken[c.ID] = true
	}
}

// Write is the notebook as a file of nbformat 4.5.
func (n *Notebook) Write() ([]byte, error) {
	n.identify()
	out := map[string]any{}
	for k, v := range n.rest {
		out[k] = v
	}
	cells := make([]any, len(n.Cells))
	for i, c := range n.Cells {
		cells[i] = c.file()
	}
	out["cells"] = cells
	out["metadata"] = n.Metadata
	out["nbformat"] = 4
	minor, _ := out["nbformat_minor"].(json.Number)
	if v, err := minor.Int64(); err != nil || v < 5 {
		out["nbformat_minor"] = 5
	}
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	err := e.Encode(out)
	return b.Bytes(), err
}

func (c *Cell) file() map[string]any {
	m := map[string]any{}
	for k, v := range c.rest {
		m[k] = v
	}
	m["id"] = c.ID
	m["cell_type"] = c.Kind
	m["source"] = lines(c.Source)
	m["metadata"] = c.Metadata
	if c.Metadata == nil {
		m["metadata"] = map[string]any{}
	}
	if c.Kind != "code" {
		return m
	}
	m["execution_count"] = nil
	if c.Count > 0 {
		m["execution_count"] = c.Count
	}
	outputs := make([]any, len(c.Outputs))
	for i, o := range c.Outputs {
		outputs[i] = map[string]any(o)
	}
	m["outputs"] = outputs
	return m
}
