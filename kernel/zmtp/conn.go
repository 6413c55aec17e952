package zmtp

import (
	"bufio"
	"bytes"
)

// Conn is the reading half of a connection after the handshake. Writing needs
// no state: AppendMessage and AppendCommand make the bytes.
type Conn struct {
	Type     SocketType // what the peer is
	Identity []byte     // what the peer wants to be called; may be empty

	r      *bufio.Reader
	limits Limits
}

// Packet is what a peer sends: a message of one or more frames, or a command.
type Packet struct {
	Command string   // empty for a message
	Frames  [][]byte // of a message; for a command its body alone
}

// Read returns the peer's next message or command. After an error the
// connection is of no more use.
func (c *Conn) Read() (Packet, error) {
	var frames [][]byte
	room := c.limits.Message
	for {
		flags, body, err := readFrame(c.r, room)
		if err != nil {
			if len(frames) > 0 {
				err = short(err)
			}
			return Packet{}, err
		}
		if flags&flagCommand != 0 {
			if len(frames) > 0 {
				return Packet{}, malformed("a command inside a message")
			}
			name, rest, err := parseCommand(body)
			return Packet{Command: name, Frames: [][]byte{rest}}, err
		}
		frames = append(frames, body)
		room -= int64(len(body))
		if flags&flagMore == 0 {
			return Packet{Frames: frames}, nil
		}
		if len(frames) == c.limits.Frames {
			return Packet{}, malformed("a message of more than %d frames", c.limits.Frames)
		}
	}
}

// Pong is the answer, as it goes over the wire, to p if that is a PING, and
// nil otherwise. The PONG repeats the context that follows the two bytes of
// the PING's time-to-live.
func (p Packet) Pong() []byte {
	if p.Command != "PING" {
		return nil
	}
	context := []byte(nil)
	if b := p.Frames[0]; len(b) > 2 {
		context = b[2:min(len(b), 2+16)]
	}
	return AppendCommand(nil, "PONG", context)
}

// Subscription reads p as a subscription to, or its cancelling, of a topic.
// Peers of version 3.0 send it as a message, those of 3.1 as a command.
func (p Packet) Subscription() (topic []byte, on, ok bool) {
	b := p.Frames[0]
	switch {
	case p.Command == "SUBSCRIBE":
		return bytes.Clone(b), true, true
	case p.Command == "CANCEL":
		return bytes.Clone(b), false, true
	case p.Command == "" && len(p.Frames) == 1 && len(b) > 0 && b[0] <= 1:
		return bytes.Clone(b[1:]), b[0] == 1, true
	}
	return nil, false, false
}
