package wire

import (
	"bytes"
	"encoding/json"
)

// Marshal is the JSON text of v on one line: keys of maps sorted, no escapes
// that only HTML needs. Bytes become base64. NaN and infinities are errors.
func Marshal(v any) (json.RawMessage, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		return nil, err
	}
	return bytes.TrimSuffix(b.Bytes(), []byte("\n")), nil
}
