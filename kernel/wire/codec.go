package wire

import (
	"bytes"
	"crypto/hmac"
	"crypto/sha256"
	"crypto/sha512"
	"encoding/hex"
	"encoding/json"
	"errors"
	"fmt"
	"hash"
	"sync"
)

var delimiter = []byte("<IDS|MSG>")

// What is wrong with frames that are no message. The sender gets no answer.
var (
	ErrFrames    = errors.New("frames are not a message")
	ErrSignature = errors.New("signature is missing or wrong")
	ErrReplayed  = errors.New("signature was used before")
	ErrJSON      = errors.New("not JSON")
)

const (
	maxIdentities = 16
	maxHeader     = 1 << 16
)

// Codec turns messages into signed frames and back. It is safe for concurrent
// use.
type Codec struct {
	key    []byte // empty: nothing is signed, nothing checked
	digest func() hash.Hash
	macs   sync.Pool

	mu   sync.Mutex
	seen replays
}

// NewCodec returns a codec for the key and signature scheme of a connection
// file; an empty scheme is hmac-sha256. With an empty key messages are neither
// signed nor checked.
func NewCodec(scheme string, key []byte) (*Codec, error) {
	c := &Codec{key: bytes.Clone(key)}
	switch scheme {
	case "hmac-sha256", "":
		c.digest = sha256.New
	case "hmac-sha512":
		c.digest = sha512.New
	default:
		return nil, fmt.Errorf("signature scheme %q is not known; use hmac-sha256", scheme)
	}
	c.macs.New = func() any { return hmac.New(c.digest, c.key) }
	return c, nil
}

// Sign is the lower-case hexadecimal signature of parts, empty with an empty
// key.
func (c *Codec) Sign(parts ...[]byte) []byte {
	if len(c.key) == 0 {
		return []byte{}
	}
	mac := c.macs.Get().(hash.Hash)
	defer c.macs.Put(mac)
	mac.Reset()
	for _, p := range parts {
		mac.Write(p)
	}
	return hex.AppendEncode(nil, mac.Sum(nil))
}

// Encode lays m out in frames: identities, delimiter, signature, header,
// parent, metadata, content, buffers.
func (c *Codec) Encode(m *Message) ([][]byte, error) {
	header, err := Marshal(m.Header)
	if err != nil {
		return nil, err
	}
	parent, metadata, content := orEmpty(m.Parent), orEmpty(m.Metadata), orEmpty(m.Content)
	frames := make([][]byte, 0, len(m.Identities)+6+len(m.Buffers))
	frames = append(frames, m.Identities...)
	frames = append(frames, delimiter, c.Sign(header, parent, metadata, content), header, parent, metadata, content)
	return append(frames, m.Buffers...), nil
}

func orEmpty(b json.RawMessage) []byte {
	if len(b) == 0 {
		return []byte("{}")
	}
	return b
}

// Decode reads a message from frames. Frames from strangers may be anything:
// the error then is ErrFrames, ErrSignature, ErrReplayed or ErrJSON.
func (c *Codec) Decode(frames [][]byte) (*Message, error) {
	at := -1
	for i := 0; i < len(frames) && i <= maxIdentities; i++ {
		if bytes.Equal(frames[i], delimiter) {
			at = i
			break
		}
	}
	if at < 0 || len(frames) < at+6 {
		return nil, ErrFrames
	}
	signature, parts := frames[at+1], frames[at+2:at+6]
	if err := c.check(signature, parts); err != nil {
		return nil, err
	}
	m := &Message{
		Identities: frames[:at:at],
		Origin:     parts[0],
		Parent:     parts[1],
		Metadata:   parts[2],
		Content:    parts[3],
		Buffers:    frames[at+6:],
	}
	if len(m.Origin) > maxHeader || len(m.Parent) > maxHeader {
		return nil, ErrFrames
	}
	for _, p := range parts {
		if !isObject(p) {
			return nil, ErrJSON
		}
	}
	if err := json.Unmarshal(m.Origin, &m.Header); err != nil {
		return nil, fmt.Errorf("%w: header: %v", ErrJSON, err)
	}
	return m, nil
}

func (c *Codec) check(signature []byte, parts [][]byte) error {
	if len(c.key) == 0 {
		return nil
	}
	if !hmac.Equal(signature, c.Sign(parts...)) {
		return ErrSignature
	}
	c.mu.Lock()
	defer c.mu.Unlock()
	if !c.seen.add(signature) {
		return ErrReplayed
	}
	return nil
}

// isObject says whether b is one JSON object.
func isObject(b []byte) bool {
	b = bytes.TrimLeft(b, " \t\r\n")
	return len(b) > 0 && b[0] == '{' && json.Valid(b)
}
