package display

import (
	"bytes"
	"encoding/json"
	"fmt"
	"maps"
	"slices"
	"strings"
	"unicode/utf8"
)

// The MIME types of the forms.
const (
	MIMEText  = "text/plain"
	MIMELaTeX = "text/latex"
	MIMEHTML  = "text/html"
	MIMESVG   = "image/svg+xml"
	MIMEPDF   = "application/pdf"
)

// Document is something to be shown.
type Document interface {
	// Bundle is the document in each form that a notebook can show it in.
	// Each call makes fresh maps, which belong to the caller.
	Bundle() Bundle
}

// Bundle is one output in several forms.
type Bundle struct {
	// Data maps a MIME type to its content: a string, a []byte for binary
	// forms (base64 in JSON), or a JSON object.
	Data map[string]any
	// Metadata maps a MIME type to hints about that form; it may be nil.
	Metadata map[string]any
}

// JSON is the bundle as a canonical JSON object with the members data and
// metadata: keys sorted, binary forms in base64, no characters escaped that
// JSON does not ask for. It fails when a content cannot be written as JSON.
func (b Bundle) JSON() ([]byte, error) {
	return canonical(map[string]any{"data": orEmpty(b.Data), "metadata": orEmpty(b.Metadata)})
}

func orEmpty(m map[string]any) map[string]any {
	if m == nil {
		return map[string]any{}
	}
	return m
}

// canonical writes v with the keys of every map sorted and without a final
// newline.
func canonical(v any) ([]byte, error) {
	var buf bytes.Buffer
	enc := json.NewEncoder(&buf)
	enc.SetEscapeHTML(false)
	if err := enc.Encode(v); err != nil {
		return nil, err
	}
	return bytes.TrimSuffix(buf.Bytes(), []byte("\n")), nil
}

// Size is the number of bytes of all forms together, as they are kept (binary
// forms before base64).
func (b Bundle) Size() int {
	n := 0
	for _, v := range b.Data {
		n += sizeOf(v)
	}
	return n
}

func sizeOf(v any) int {
	switch v := v.(type) {
	case string:
		return len(v)
	case []byte:
		return len(v)
	}
	text, err := canonical(v)
	if err != nil {
		return 0
	}
	return len(text)
}

// Limit returns the bundle with no form of more than limit bytes. A longer
// text is cut between two lines, or between two characters when one line fills
// it, and ends with a line that counts what is shown and gives hint, the way to
// see the rest; every other long form is left out, and the text says which.
func (b Bundle) Limit(limit int, hint string) Bundle {
	c := Bundle{Data: maps.Clone(b.Data), Metadata: b.Metadata}
	var left []string
	for _, t := range slices.Sorted(maps.Keys(b.Data)) {
		if t != MIMEText && sizeOf(b.Data[t]) > limit {
			delete(c.Data, t)
			left = append(left, fmt.Sprintf("%s (%d bytes)", t, sizeOf(b.Data[t])))
		}
	}
	text, _ := c.Data[MIMEText].(string)
	if len(text) <= limit && left == nil {
		return c
	}
	var notes []string
	if len(text) > limit {
		kept := cut(text, limit)
		notes = append(notes, fmt.Sprintf("%d of %d bytes are shown", len(kept), len(text)))
		text = kept
	}
	if left != nil {
		notes = append(notes, "left out, too long: "+strings.Join(left, ", "))
	}
	if hint != "" {
		notes = append(notes, hint)
	}
	if text != "" && !strings.HasSuffix(text, "\n") {
		text += "\n"
	}
	c.Data[MIMEText] = text + "# " + strings.Join(notes, "; ")
	return c
}

// cut keeps at most limit bytes of text, whole lines where it can.
func cut(text string, limit int) string {
	if len(text) <= limit {
		return text
	}
	limit = max(limit, 0)
	for limit > 0 && !utf8.RuneStart(text[limit]) {
		limit--
	}
	kept := text[:limit]
	if i := strings.LastIndexByte(kept, '\n'); i > 0 {
		kept = kept[:i]
	}
	return kept
}

// Text is plain text.
type Text struct{ Text string }

// Bundle has the text alone.
func (t Text) Bundle() Bundle {
	return Bundle{Data: map[string]any{MIMEText: t.Text}}
}
