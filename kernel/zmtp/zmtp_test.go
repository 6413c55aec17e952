package zmtp

import (
	"bufio"
	"bytes"
	"encoding/binary"
	"errors"
	"io"
	"net"
	"runtime"
	"testing"

	"github.com/go-zeromq/zmq4"
	"github.com/go-zeromq/zmq4/security/null"
)

// twin is a connection whose other end speaks through an implementation that
// is not ours: github.com/go-zeromq/zmq4, an outside check of ours.
func twin(t *testing.T, own SocketType, theirs zmq4.SocketType) (*Conn, net.Conn, *zmq4.Conn) {
	t.Helper()
	l, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	defer l.Close()
	peer := make(chan *zmq4.Conn, 1)
	go func() {
		raw, err := net.Dial("tcp", l.Addr().String())
		if err != nil {
			t.Error(err)
			peer <- nil
			return
		}
		z, err := zmq4.Open(raw, null.Security(), theirs, zmq4.SocketIdentity("me"), false, nil)
		if err != nil {
			t.Error(err)
		}
		peer <- z
	}()
	raw, err := l.Accept()
	if err != nil {
		t.Fatal(err)
	}
	c, err := Handshake(raw, own, nil, DefaultLimits)
	if err != nil {
		t.Fatal(err)
	}
	z := <-peer
	if z == nil {
		t.FailNow()
	}
	t.Cleanup(func() { raw.Close(); z.Close() })
	return c, raw, z
}

func TestConnTalksToOtherImplementation(t *testing.T) {
	c, raw, z := twin(t, Router, zmq4.Dealer)
	if c.Type != Dealer || string(c.Identity) != "me" {
		t.Errorf("peer is %q %q", c.Type, c.Identity)
	}
	frames := [][]byte{{}, []byte("a"), bytes.Repeat([]byte("b"), 255), bytes.Repeat([]byte("c"), 256), bytes.Repeat([]byte("d"), 100_000)}
	if err := z.SendMsg(zmq4.NewMsgFrom(frames...)); err != nil {
		t.Fatal(err)
	}
	p, err := c.Read()
	if err != nil {
		t.Fatal(err)
	}
	if p.Command != "" || len(p.Frames) != len(frames) {
		t.Fatalf("got %q with %d frames", p.Command, len(p.Frames))
	}
	go raw.Write(AppendMessage(nil, p.Frames...))
	m, err := z.RecvMsg()
	if err != nil {
		t.Fatal(err)
	}
	for i := range frames {
		if !bytes.Equal(frames[i], m.Frames[i]) {
			t.Errorf("frame %d came back with %d bytes", i, len(m.Frames[i]))
		}
	}
	if err := z.SendCmd(zmq4.CmdPing, []byte("\x00\x0acontext")); err != nil {
		t.Fatal(err)
	}
	if p, err = c.Read(); err != nil {
		t.Fatal(err)
	}
	raw.Write(p.Pong())
	cmd, err := z.RecvCmd()
	if err != nil || cmd.Name != "PONG" || string(cmd.Body) != "context" {
		t.Errorf("answer to PING: %+v, %v", cmd, err)
	}
}

func TestSubscription(t *testing.T) {
	for _, c := range []struct {
		p     Packet
		topic string
		on    bool
		ok    bool
	}{
		{Packet{Frames: [][]byte{[]byte("\x01stream")}}, "stream", true, true},
		{Packet{Frames: [][]byte{{1}}}, "", true, true},
		{Packet{Frames: [][]byte{[]byte("\x00stream")}}, "stream", false, true},
		{Packet{Command: "SUBSCRIBE", Frames: [][]byte{[]byte("x")}}, "x", true, true},
		{Packet{Command: "CANCEL", Frames: [][]byte{[]byte("x")}}, "x", false, true},
		{Packet{Frames: [][]byte{{2}}}, "", false, false},
		{Packet{Frames: [][]byte{{}}}, "", false, false},
		{Packet{Frames: [][]byte{{1}, {1}}}, "", false, false},
	} {
		topic, on, ok := c.p.Subscription()
		if string(topic) != c.topic || on != c.on || ok != c.ok {
			t.Errorf("%+v: %q %v %v", c.p, topic, on, ok)
		}
	}
}

// hello is what a well-behaved dealer sends first.
func hello() []byte { return appendReady(greeting(), Dealer, nil) }

type script struct {
	io.Reader
	io.Writer
}

func TestHandshakeRefusesStrangers(t *testing.T) {
	bad := map[string][]byte{
		"empty":              nil,
		"web browser":        []byte("GET / HTTP/1.1\r\nHost: localhost\r\n\r\n" + string(make([]byte, 64))),
		"half a greeting":    greeting()[:20],
		"old version":        append(append(greeting()[:10:10], 1), make([]byte, 200)...),
		"other mechanism":    append(append(greeting()[:12:12], "CURVE"...), make([]byte, 200)...),
		"unknown type":       appendReady(greeting(), "WARBLER", nil),
		"wrong type":         appendReady(greeting(), Sub, nil),
		"no type":            AppendCommand(greeting(), "READY", nil),
		"other command":      AppendCommand(greeting(), "HELLO", nil),
		"message":            AppendMessage(greeting(), []byte("x")),
		"huge READY":         append(greeting(), 6, 0, 0, 0, 1, 0, 0, 0, 0),
		"truncated property": AppendCommand(greeting(), "READY", []byte("\x0bSocket-Type\x00\x00\x00\xffDEALER")),
		"empty command":      append(greeting(), 4, 0),
		"long identity":      appendReady(greeting(), Dealer, make([]byte, 256)),
	}
	for name, in := range bad {
		_, err := Handshake(script{bytes.NewReader(in), io.Discard}, Router, nil, DefaultLimits)
		if err == nil {
			t.Errorf("%s: accepted", name)
		}
	}
	if _, err := Handshake(script{bytes.NewReader(hello()), io.Discard}, Router, nil, DefaultLimits); err != nil {
		t.Errorf("a dealer is refused: %v", err)
	}
}

func TestReadIsBounded(t *testing.T) {
	long := func(n uint64) []byte { return binary.BigEndian.AppendUint64([]byte{flagLong}, n) }
	many := bytes.Repeat([]byte{flagMore, 0}, 1000)
	bad := map[string][]byte{
		"huge length":          long(1 << 62),
		"length with top bit":  long(1 << 63),
		"just too long":        long(uint64(DefaultLimits.Message) + 1),
		"too many frames":      many,
		"reserved flags":       {0x80, 1, 0},
		"command with more":    {flagCommand | flagMore, 2, 1, 'x'},
		"command in a message": append([]byte{flagMore, 0}, AppendCommand(nil, "PING", nil)...),
	}
	for name, in := range bad {
		c := &Conn{r: bufio.NewReader(bytes.NewReader(in)), limits: DefaultLimits}
		if _, err := c.Read(); !errors.Is(err, errMalformed) {
			t.Errorf("%s: %v", name, err)
		}
	}
	for _, in := range [][]byte{{0}, {0, 5, 'x'}, {flagMore, 1, 'x'}, long(1 << 20)} {
		c := &Conn{r: bufio.NewReader(bytes.NewReader(in)), limits: DefaultLimits}
		if _, err := c.Read(); err != io.ErrUnexpectedEOF {
			t.Errorf("%v: %v", in, err)
		}
	}
}

func TestLengthAloneTakesNoMemory(t *testing.T) {
	in := binary.BigEndian.AppendUint64([]byte{flagLong}, 60<<20)
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	c := &Conn{r: bufio.NewReader(bytes.NewReader(in)), limits: DefaultLimits}
	if _, err := c.Read(); err != io.ErrUnexpectedEOF {
		t.Error(err)
	}
	runtime.ReadMemStats(&after)
	got := after.TotalAlloc - before.TotalAlloc
	if got > 1<<20 {
		t.Errorf("a frame that never comes takes %d bytes", got)
	}
}

func FuzzConn(f *testing.F) {
	f.Add(hello())
	f.Add(AppendMessage(hello(), []byte("a"), nil, make([]byte, 300)))
	f.Add(AppendCommand(hello(), "PING", []byte("\x00\x01xyz")))
	f.Add(append(hello(), 2, 255, 255, 255, 255, 255, 255, 255, 255))
	f.Fuzz(func(t *testing.T, in []byte) {
		c, err := Handshake(script{bytes.NewReader(in), io.Discard}, Router, nil, Limits{Frames: 8, Message: 1 << 16})
		for err == nil {
			var p Packet
			if p, err = c.Read(); err == nil {
				p.Pong()
				p.Subscription()
				if p.Command != "" {
					continue
				}
				again := &Conn{r: bufio.NewReader(bytes.NewReader(AppendMessage(nil, p.Frames...))), limits: DefaultLimits}
				q, err := again.Read()
				if err != nil || len(q.Frames) != len(p.Frames) {
					t.Fatalf("%q does not come back: %v", p.Frames, err)
				}
			}
		}
	})
}
