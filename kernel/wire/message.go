package wire

import (
	"encoding/json"
	"strings"
)

// Protocol is the version of the message format spoken here.
const Protocol = "5.5"

// Header identifies a message.
type Header struct {
	ID       string `json:"msg_id"`
	Session  string `json:"session"`
	Username string `json:"username"`
	Date     string `json:"date"` // ISO 8601 with a zone
	Type     string `json:"msg_type"`
	Version  string `json:"version"`
}

// Message is one message as read from a peer, or one to be sent.
type Message struct {
	// Identities are the frames before the delimiter: the route to a peer, or
	// the topic of a broadcast.
	Identities [][]byte
	Header     Header
	// Origin is the header byte for byte as it came, with whatever else the
	// peer put there; answers carry it as their parent. Nil in a message to be
	// sent.
	Origin  json.RawMessage
	Parent  json.RawMessage // Origin of the message that caused this one; {} when nil
	Content json.RawMessage
	// Metadata holds extra facts about the content; {} when nil.
	Metadata json.RawMessage
	Buffers  [][]byte
}

// IsRequest says whether a reply of the same name is due.
func (m *Message) IsRequest() bool { return strings.HasSuffix(m.Header.Type, "_request") }

// ReplyType is the type of the reply to a request.
func (m *Message) ReplyType() string {
	return strings.TrimSuffix(m.Header.Type, "_request") + "_reply"
}

// ParentHeader reads the header of the message that caused m; it is zero when
// there is none.
func (m *Message) ParentHeader() Header {
	var h Header
	_ = json.Unmarshal(m.Parent, &h)
	return h
}
