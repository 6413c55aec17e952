package zmtp

import (
	"bufio"
	"bytes"
	"encoding/binary"
	"io"
	"slices"
	"strings"
)

// SocketType is the kind of socket that a peer says it is.
type SocketType string

// The types that Jupyter channels use.
const (
	Router SocketType = "ROUTER"
	Dealer SocketType = "DEALER"
	Req    SocketType = "REQ"
	XPub   SocketType = "XPUB"
	Pub    SocketType = "PUB"
	Sub    SocketType = "SUB"
	XSub   SocketType = "XSUB"
)

// partners lists who may stand at the other end.
var partners = map[SocketType][]SocketType{
	Router: {Dealer, Req, Router},
	Dealer: {Router, Dealer},
	Req:    {Router},
	XPub:   {Sub, XSub},
	Sub:    {Pub, XPub},
}

const (
	greetingSize  = 64
	maxHandshake  = 1 << 12 // bytes of the READY command
	maxIdentity   = 255
	propType      = "Socket-Type"
	propIdentity  = "Identity"
	mechanismNull = "NULL"
)

// greeting is what both ends send first.
func greeting() []byte {
	g := make([]byte, greetingSize)
	g[0], g[9] = 0xff, 0x7f
	g[10] = 3 // version 3.0
	copy(g[12:32], mechanismNull)
	return g
}

// checkGreeting reads the peer's greeting. Peers wait for the first ten bytes
// of each other before they send the rest, so it is checked as it comes.
func checkGreeting(r io.Reader) error {
	var g [greetingSize]byte
	if _, err := io.ReadFull(r, g[:11]); err != nil {
		return short(err)
	}
	if g[0] != 0xff || g[9] != 0x7f {
		return malformed("greeting")
	}
	if g[10] < 3 {
		return malformed("protocol version %d", g[10])
	}
	if _, err := io.ReadFull(r, g[11:]); err != nil {
		return short(err)
	}
	if m := string(bytes.TrimRight(g[12:32], "\x00")); m != mechanismNull {
		return malformed("security mechanism %q", m)
	}
	return nil
}

// appendReady appends the READY command.
func appendReady(dst []byte, t SocketType, identity []byte) []byte {
	body := appendProperty(nil, propType, []byte(t))
	if len(identity) > 0 {
		body = appendProperty(body, propIdentity, identity)
	}
	return AppendCommand(dst, "READY", body)
}

func appendProperty(dst []byte, name string, value []byte) []byte {
	dst = append(dst, byte(len(name)))
	dst = append(dst, name...)
	dst = binary.BigEndian.AppendUint32(dst, uint32(len(value)))
	return append(dst, value...)
}

// parseReady reads the properties of a READY command; those it does not know
// it skips.
func parseReady(b []byte) (t SocketType, identity []byte, err error) {
	for len(b) > 0 {
		n := int(b[0])
		if n == 0 || len(b) < 1+n+4 {
			return "", nil, malformed("property of READY")
		}
		name := string(b[1 : 1+n])
		size := binary.BigEndian.Uint32(b[1+n:])
		b = b[1+n+4:]
		if uint64(size) > uint64(len(b)) {
			return "", nil, malformed("property of READY")
		}
		switch value := b[:size]; {
		case strings.EqualFold(name, propType):
			t = SocketType(value)
		case strings.EqualFold(name, propIdentity):
			if len(value) > maxIdentity {
				return "", nil, malformed("identity of %d bytes", len(value))
			}
			identity = bytes.Clone(value)
		}
		b = b[size:]
	}
	return t, identity, nil
}

// Handshake greets the peer at the other end of rw and returns the connection.
// Own says what this end is; identity may be empty. A silent peer keeps it
// waiting: set a deadline on rw.
func Handshake(rw io.ReadWriter, own SocketType, identity []byte, limits Limits) (*Conn, error) {
	// Both ends speak first; over a pipe without a buffer that needs a second
	// goroutine.
	sent := make(chan error, 1)
	go func() {
		_, err := rw.Write(appendReady(greeting(), own, identity))
		sent <- err
	}()
	c := &Conn{r: bufio.NewReaderSize(rw, 1<<14), limits: limits}
	err := c.meet(own)
	if err != nil {
		return nil, err // the caller closes rw, which ends the goroutine
	}
	if err := <-sent; err != nil {
		return nil, err
	}
	return c, nil
}

// meet reads the peer's half of the handshake.
func (c *Conn) meet(own SocketType) error {
	if err := checkGreeting(c.r); err != nil {
		return err
	}
	flags, frame, err := readFrame(c.r, maxHandshake)
	if err != nil {
		return short(err)
	}
	if flags&flagCommand == 0 {
		return malformed("a message before READY")
	}
	name, body, err := parseCommand(frame)
	if err != nil {
		return err
	}
	if name != "READY" {
		return malformed("command %q where READY was due", name)
	}
	if c.Type, c.Identity, err = parseReady(body); err != nil {
		return err
	}
	if !slices.Contains(partners[own], c.Type) {
		return malformed("a %s socket cannot talk to a %q socket", own, c.Type)
	}
	return nil
}
