package transport

import (
	"bytes"
	"context"
	"encoding/binary"
	"fmt"
	"io"
	"net"
	"os"
	"path/filepath"
	"sync"
	"testing"
	"time"

	"adjoin/kernel/zmtp"
)

// patience is how long a test waits for what must come.
const patience = 5 * time.Second

func listen(t testing.TB) net.Listener {
	t.Helper()
	l, err := Listen(Address{IP: "127.0.0.1"})
	if err != nil {
		t.Fatal(err)
	}
	return l
}

func dial(t testing.TB, l net.Listener) net.Conn {
	t.Helper()
	c, err := net.Dial("tcp", l.Addr().String())
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { c.Close() })
	return c
}

// visitor is a well-behaved peer.
type visitor struct {
	*zmtp.Conn
	raw net.Conn
}

func visit(t testing.TB, l net.Listener, own zmtp.SocketType, name string) visitor {
	t.Helper()
	raw := dial(t, l)
	c, err := zmtp.Handshake(raw, own, []byte(name), zmtp.DefaultLimits)
	if err != nil {
		t.Fatal(err)
	}
	return visitor{c, raw}
}

func (v visitor) send(frames ...string) {
	var b [][]byte
	for _, f := range frames {
		b = append(b, []byte(f))
	}
	_, _ = v.raw.Write(zmtp.AppendMessage(nil, b...))
}

func (v visitor) receive(t testing.TB) string {
	t.Helper()
	_ = v.raw.SetReadDeadline(time.Now().Add(patience))
	p, err := v.Read()
	if err != nil {
		t.Fatal(err)
	}
	return p.Command + string(bytes.Join(p.Frames, []byte("|")))
}

// echo answers everything with itself.
func echo(r *Router, frames [][]byte) { r.Send(frames) }

func newEcho(t testing.TB, o Options) net.Listener {
	t.Helper()
	l := listen(t)
	r := NewRouter(l, o, echo)
	t.Cleanup(func() { r.Close(0) })
	return l
}

func TestRouterAnswersEachPeer(t *testing.T) {
	l := newEcho(t, Options{})
	var all sync.WaitGroup
	for i := range 5 {
		v := visit(t, l, zmtp.Dealer, fmt.Sprintf("peer%d", i))
		all.Go(func() {
			for k := range 50 {
				v.send(fmt.Sprint(i, k), "", "x")
			}
			for k := range 50 {
				if got, want := v.receive(t), fmt.Sprint(i, k)+"||x"; got != want {
					t.Errorf("%q, want %q", got, want)
					return
				}
			}
		})
	}
	all.Wait()
}

func TestRouterServesReq(t *testing.T) {
	v := visit(t, newEcho(t, Options{}), zmtp.Req, "")
	v.send("", "ping")
	if got := v.receive(t); got != "|ping" {
		t.Errorf("%q", got)
	}
}

func TestRouterAnswersTheNewestOfAName(t *testing.T) {
	l := newEcho(t, Options{})
	old := visit(t, l, zmtp.Dealer, "same")
	old.send("a")
	old.receive(t)
	fresh := visit(t, l, zmtp.Dealer, "same")
	fresh.send("b")
	if got := fresh.receive(t); got != "b" {
		t.Errorf("%q", got)
	}
	old.raw.Close()
	fresh.send("c")
	if got := fresh.receive(t); got != "c" {
		t.Errorf("after the old one left: %q", got)
	}
}

func TestRouterKnowsNoStrangers(t *testing.T) {
	r := NewRouter(listen(t), Options{}, echo)
	defer r.Close(0)
	if r.Send([][]byte{[]byte("nobody"), []byte("x")}) || r.Send(nil) {
		t.Error("sent to nobody")
	}
}

func TestPingIsAnswered(t *testing.T) {
	v := visit(t, newEcho(t, Options{}), zmtp.Dealer, "")
	_, _ = v.raw.Write(zmtp.AppendCommand(nil, "PING", []byte("\x00\x10abc")))
	if got := v.receive(t); got != "PONGabc" {
		t.Errorf("%q", got)
	}
}

// hostile peers, each of which must leave the others alone.
var hostile = map[string]func(t *testing.T, l net.Listener){
	"silent": func(t *testing.T, l net.Listener) { dial(t, l) },
	"garbage": func(t *testing.T, l net.Listener) {
		c := dial(t, l)
		_, _ = c.Write(bytes.Repeat([]byte("GET / HTTP/1.1\r\n"), 100))
	},
	"half a greeting": func(t *testing.T, l net.Listener) {
		c := dial(t, l)
		_, _ = c.Write([]byte{0xff, 0, 0})
		c.Close()
	},
	"wrong type": func(t *testing.T, l net.Listener) {
		if _, err := zmtp.Handshake(dial(t, l), zmtp.Sub, nil, zmtp.DefaultLimits); err == nil {
			t.Error("a SUB socket is welcome")
		}
	},
	"huge frame": func(t *testing.T, l net.Listener) {
		v := visit(t, l, zmtp.Dealer, "")
		_, _ = v.raw.Write(binary.BigEndian.AppendUint64([]byte{2}, 1<<62))
		_ = v.raw.SetReadDeadline(time.Now().Add(patience))
		if _, err := v.raw.Read(make([]byte, 1)); err == nil || os.IsTimeout(err) {
			t.Error("it is not disconnected")
		}
	},
	"truncated message": func(t *testing.T, l net.Listener) {
		v := visit(t, l, zmtp.Dealer, "")
		_, _ = v.raw.Write([]byte{1, 200, 'x'})
		v.raw.Close()
	},
	"stops reading": func(t *testing.T, l net.Listener) {
		v := visit(t, l, zmtp.Dealer, "")
		big := zmtp.AppendMessage(nil, make([]byte, 1<<20))
		_ = v.raw.SetWriteDeadline(time.Now().Add(300 * time.Millisecond))
		for range 40 {
			if _, err := v.raw.Write(big); err != nil {
				break
			}
		}
	},
}

func TestHostilePeers(t *testing.T) {
	for name, attack := range hostile {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			l := newEcho(t, Options{Stall: time.Second, Most: 8 << 20})
			before := visit(t, l, zmtp.Dealer, "before")
			for range 3 {
				attack(t, l)
			}
			after := visit(t, l, zmtp.Dealer, "after")
			for _, v := range []visitor{before, after} {
				v.send("still there")
				if got := v.receive(t); got != "still there" {
					t.Errorf("%q", got)
				}
			}
		})
	}
}

func TestHandshakeHasADeadline(t *testing.T) {
	c := dial(t, newEcho(t, Options{Handshake: 50 * time.Millisecond}))
	_ = c.SetReadDeadline(time.Now().Add(patience))
	if _, err := io.Copy(io.Discard, c); err != nil {
		t.Errorf("a silent peer is not disconnected: %v", err)
	}
}

func TestPeersAreCounted(t *testing.T) {
	l := newEcho(t, Options{Peers: 2, Handshake: time.Minute})
	dial(t, l)
	dial(t, l)
	c := dial(t, l)
	_ = c.SetReadDeadline(time.Now().Add(patience))
	if _, err := io.Copy(io.Discard, c); os.IsTimeout(err) {
		t.Error("the third is let in")
	}
}

func TestPanicEndsOneConnection(t *testing.T) {
	l := listen(t)
	r := NewRouter(l, Options{}, func(r *Router, f [][]byte) {
		if string(f[1]) == "panic" {
			panic("a defect")
		}
		r.Send(f)
	})
	defer r.Close(0)
	a, b := visit(t, l, zmtp.Dealer, "a"), visit(t, l, zmtp.Dealer, "b")
	a.send("panic")
	b.send("well")
	if got := b.receive(t); got != "well" {
		t.Errorf("%q", got)
	}
}

func welcome(topic []byte) [][]byte { return [][]byte{topic, []byte("welcome")} }

func newPublisher(t testing.TB, o Options) (*Publisher, net.Listener) {
	t.Helper()
	l := listen(t)
	p := NewPublisher(l, o, welcome)
	t.Cleanup(func() { p.Close(0) })
	return p, l
}

func TestPublisherWelcomesFirst(t *testing.T) {
	p, l := newPublisher(t, Options{})
	stop := make(chan struct{})
	var flood sync.WaitGroup
	flood.Go(func() {
		for {
			select {
			case <-stop:
				return
			default:
				p.Publish([][]byte{[]byte("topic"), []byte("news")})
				p.Wait(context.Background())
			}
		}
	})
	for range 20 {
		v := visit(t, l, zmtp.Sub, "")
		v.send("\x01")
		if got := v.receive(t); got != "|welcome" {
			t.Errorf("first is %q", got)
		}
		if got := v.receive(t); got != "topic|news" {
			t.Errorf("then comes %q", got)
		}
		v.raw.Close()
	}
	close(stop)
	flood.Wait()
}

func TestPublisherFilters(t *testing.T) {
	p, l := newPublisher(t, Options{})
	v := visit(t, l, zmtp.Sub, "")
	v.send("\x01ab")
	if got := v.receive(t); got != "ab|welcome" {
		t.Fatalf("%q", got)
	}
	_, _ = v.raw.Write(zmtp.AppendCommand(nil, "SUBSCRIBE", []byte("z"))) // as version 3.1 has it
	if got := v.receive(t); got != "z|welcome" {
		t.Fatalf("%q", got)
	}
	for _, topic := range []string{"a", "abc", "x", "zebra", "ab"} {
		p.Publish([][]byte{[]byte(topic), nil})
	}
	for _, want := range []string{"abc|", "zebra|", "ab|"} {
		if got := v.receive(t); got != want {
			t.Errorf("%q, want %q", got, want)
		}
	}
	v.send("\x00ab")
	v.send("\x00never subscribed")
	v.send("\x01q")
	v.receive(t)
	p.Publish([][]byte{[]byte("ab"), nil})
	p.Publish([][]byte{[]byte("zoo"), nil})
	if got := v.receive(t); got != "zoo|" {
		t.Errorf("after cancelling: %q", got)
	}
}

// A subscriber that stops reading must not keep anything from the others, nor
// may it take memory without end.
func TestStuckSubscriber(t *testing.T) {
	p, l := newPublisher(t, Options{Patience: 300 * time.Millisecond, Room: 1 << 20, Most: 24 << 20})
	stuck := visit(t, l, zmtp.Sub, "")
	stuck.send("\x01")
	stuck.receive(t)
	well := visit(t, l, zmtp.Sub, "")
	well.send("\x01")
	well.receive(t)
	const n, size = 600, 100_000
	go func() {
		for i := range n {
			p.Wait(context.Background())
			p.Publish([][]byte{fmt.Appendf(nil, "%d", i), make([]byte, size)})
		}
	}()
	for i := range n {
		got := well.receive(t)
		if want := fmt.Sprintf("%d|", i); got[:len(want)] != want || len(got) != len(want)+size {
			t.Fatalf("broadcast %d is %.20q", i, got)
		}
	}
	p.order.Lock()
	left := len(p.topics)
	p.order.Unlock()
	if left != 1 {
		t.Errorf("%d subscribers are left", left)
	}
}

func TestCloseDrains(t *testing.T) {
	p, l := newPublisher(t, Options{})
	v := visit(t, l, zmtp.Sub, "")
	v.send("\x01")
	v.receive(t)
	const n = 1000
	for i := range n {
		p.Publish([][]byte{fmt.Appendf(nil, "%d", i), make([]byte, 1000)})
	}
	done := make(chan struct{})
	go func() {
		p.Close(patience)
		close(done)
	}()
	for i := range n {
		if got, want := v.receive(t), fmt.Sprintf("%d|", i); got[:len(want)] != want {
			t.Fatalf("%.10q", got)
		}
	}
	<-done
	if _, err := v.Read(); err == nil {
		t.Error("still connected")
	}
}

func TestMemory(t *testing.T) {
	m := NewMemory()
	r := NewRouter(m, Options{}, echo)
	raw, err := m.Dial()
	if err != nil {
		t.Fatal(err)
	}
	c, err := zmtp.Handshake(raw, zmtp.Dealer, nil, zmtp.DefaultLimits)
	if err != nil {
		t.Fatal(err)
	}
	v := visitor{c, raw}
	go v.send("x")
	if got := v.receive(t); got != "x" {
		t.Errorf("%q", got)
	}
	r.Close(0)
	if _, err := m.Dial(); err == nil {
		t.Error("a closed listener is dialled")
	}
}

func TestListenReplacesAbandonedSocket(t *testing.T) {
	dir, err := os.MkdirTemp("", "k")
	if err != nil {
		t.Fatal(err)
	}
	defer os.RemoveAll(dir)
	a := Address{Transport: "ipc", IP: filepath.Join(dir, "s"), Port: 1}
	l, err := Listen(a)
	if err != nil {
		t.Fatal(err)
	}
	if _, err := Listen(a); err == nil {
		t.Error("a socket in use is taken")
	}
	l.(*net.UnixListener).SetUnlinkOnClose(false) // as when the process is killed
	l.Close()
	if l, err = Listen(a); err != nil {
		t.Fatalf("an abandoned socket is not replaced: %v", err)
	}
	l.Close()
	if err := os.WriteFile(a.IP+"-1", []byte("precious"), 0o600); err != nil {
		t.Fatal(err)
	}
	if _, err := Listen(a); err == nil {
		t.Error("a file that is no socket is replaced")
	}
}

func TestListenRefuses(t *testing.T) {
	if _, err := Listen(Address{Transport: "pigeon"}); err == nil {
		t.Error("an unknown transport is accepted")
	}
}
