package notebook

import (
	"encoding/json"
	"fmt"
	"strings"

	"adjoin/kernel/client"
)

// collector turns the broadcasts about one cell into its outputs.
type collector struct {
	outputs []Output
	clear   bool // what comes next replaces what is there
}

// see takes one broadcast.
func (c *collector) see(a client.Arrival) error {
	if !a.Broadcast {
		return nil
	}
	kind := a.Header.Type
	var m map[string]any
	d := json.NewDecoder(strings.NewReader(string(a.Content)))
	d.UseNumber()
	if err := d.Decode(&m); err != nil {
		return fmt.Errorf("a %s that is not JSON: %w", kind, err)
	}
	switch kind {
	case "clear_output":
		if c.clear, _ = m["wait"].(bool); !c.clear {
			c.outputs = nil
		}
	case "stream":
		c.stream(joined(m["name"]), joined(m["text"]))
	case "display_data", "execute_result":
		o := Output{"output_type": kind, "data": fileData(m["data"]), "metadata": object(m["metadata"])}
		if kind == "execute_result" {
			o["execution_count"] = m["execution_count"]
		}
		c.add(o)
	case "error":
		c.add(Output{"output_type": kind, "ename": m["ename"], "evalue": m["evalue"], "traceback": m["traceback"]})
	}
	return nil
}

func (c *collector) add(o Output) {
	if c.clear {
		c.outputs, c.clear = nil, false
	}
	c.outputs = append(c.outputs, o)
}

// stream appends to the output before, when that is of the same stream, so
// that it does not matter in which pieces text comes.
func (c *collector) stream(name, text string) {
	if n := len(c.outputs); n > 0 && !c.clear {
		if last := c.outputs[n-1]; last["output_type"] == "stream" && last["name"] == name {
			last["text"] = lines(last.Text() + text)
			return
		}
	}
	c.add(Output{"output_type": "stream", "name": name, "text": lines(text)})
}

// Text is the text of a stream.
func (o Output) Text() string { return textOf(o["text"]) }

func textOf(v any) string {
	if l, ok := v.([]string); ok {
		return strings.Join(l, "")
	}
	return joined(v)
}

func object(v any) map[string]any {
	m, _ := v.(map[string]any)
	if m == nil {
		m = map[string]any{}
	}
	return m
}

// fileData is a bundle as the file holds it: texts as lists of lines.
func fileData(v any) map[string]any {
	data := map[string]any{}
	for mime, x := range object(v) {
		if s, ok := x.(string); ok && (strings.HasPrefix(mime, "text/") || mime == "image/svg+xml" || mime == "application/javascript") {
			data[mime] = lines(s)
			continue
		}
		data[mime] = x
	}
	return data
}

// Form is the text of one form of an output's data, "" when it has none.
func (o Output) Form(mime string) string { return textOf(object(o["data"])[mime]) }

// Kind is the type of the output.
func (o Output) Kind() string { return textOf(o["output_type"]) }
