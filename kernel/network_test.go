package kernel

import (
	"bytes"
	"context"
	"encoding/binary"
	"encoding/json"
	"net"
	"os"
	"path/filepath"
	"runtime"
	"sync"
	"testing"
	"time"

	"adjoin/kernel/client"
	"adjoin/kernel/transport"
	"adjoin/kernel/wire"
	"adjoin/kernel/zmtp"
)

// intruder is a peer that writes frames of its own making.
type intruder struct {
	*zmtp.Conn
	raw net.Conn
}

func intrude(t *testing.T, k *running, port int, own zmtp.SocketType) intruder {
	t.Helper()
	raw, err := k.conn.Dial(port)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { raw.Close() })
	c, err := zmtp.Handshake(raw, own, nil, zmtp.DefaultLimits)
	if err != nil {
		t.Fatal(err)
	}
	return intruder{c, raw}
}

func (i intruder) send(frames ...[]byte) { _, _ = i.raw.Write(zmtp.AppendMessage(nil, frames...)) }

// answered says whether anything comes back in time.
func (i intruder) answered(within time.Duration) bool {
	_ = i.raw.SetReadDeadline(time.Now().Add(within))
	_, err := i.Read()
	return err == nil
}

// signed is a request as a client with this key would send it.
func signed(t *testing.T, key, id string) [][]byte {
	t.Helper()
	c, err := wire.NewCodec("", []byte(key))
	if err != nil {
		t.Fatal(err)
	}
	b, err := c.Encode(&wire.Message{Header: wire.Header{ID: id, Type: "kernel_info_request", Version: "5.5"}})
	if err != nil {
		t.Fatal(err)
	}
	return b
}

func TestUnsignedAndReplayedAreDropped(t *testing.T) {
	k := onNetwork(t, Connection{IP: "127.0.0.1"}, Options{})
	var seen recorder
	c := connect(t, k, seen.tap)
	for name, port := range map[string]int{"shell": k.conn.Shell, "control": k.conn.Control} {
		good := signed(t, testKey, "id "+name)
		with := func(at int, b []byte) [][]byte {
			f := append([][]byte(nil), good...)
			f[at] = b
			return f
		}
		for what, frames := range map[string][][]byte{
			"a wrong key":         signed(t, "another key", "1"),
			"no signature":        with(1, nil),
			"half a signature":    with(1, good[1][:20]),
			"a changed content":   with(5, []byte(`{"x":1}`)),
			"too few frames":      good[:5],
			"no delimiter":        good[1:],
			"an empty frame":      {nil},
			"a delimiter alone":   {[]byte("<IDS|MSG>")},
			"a hundred frames":    make([][]byte, 100),
			"binary in each part": {[]byte("<IDS|MSG>"), {0}, {1}, {2}, {3}, {4}},
		} {
			i := intrude(t, k, port, zmtp.Dealer)
			i.send(frames...)
			if i.answered(40 * time.Millisecond) {
				t.Errorf("%s: %s is answered", name, what)
			}
		}
		i := intrude(t, k, port, zmtp.Dealer)
		i.send(good...)
		if !i.answered(5 * time.Second) {
			t.Errorf("%s: what is signed is not answered", name)
		}
		i = intrude(t, k, port, zmtp.Dealer)
		i.send(good...)
		if i.answered(40 * time.Millisecond) {
			t.Errorf("%s: a replay is answered", name)
		}
	}
	if got := run(t, c, code("result fine")); got.result != "fine" {
		t.Errorf("%+v", got)
	}
	requests := map[string]bool{}
	for _, m := range seen.all() {
		if id := m.ParentHeader().ID; id != "" {
			requests[id] = true
		}
	}
	if len(requests) != 3 { // one on each channel, and the cell
		t.Errorf("%d requests were let in", len(requests))
	}
}

func TestEmptyKey(t *testing.T) {
	c := Connection{IP: "127.0.0.1"}
	l, err := c.Listen()
	if err != nil {
		t.Fatal(err)
	}
	serve(t, l, Options{})
	k, err := client.Connect(limit(t, 5*time.Second), c.dialer(), client.Options{})
	if err != nil {
		t.Fatal(err)
	}
	defer k.Close()
	if got := run(t, k, code("result fine")); got.result != "fine" {
		t.Errorf("%+v", got)
	}
}

// While peers of all bad kinds are at all five channels, a client works as if
// it were alone.
func TestBadPeersAreNotNoticed(t *testing.T) {
	k := onNetwork(t, Connection{IP: "127.0.0.1"}, Options{})
	before := connect(t, k, nil)
	for _, port := range k.conn.ports() {
		open := func() net.Conn {
			c, err := k.conn.Dial(*port)
			if err != nil {
				t.Fatal(err)
			}
			t.Cleanup(func() { c.Close() })
			return c
		}
		open() // silent
		_, _ = open().Write(bytes.Repeat([]byte("garbage\r\n"), 1000))
		c := open()
		_, _ = c.Write([]byte{0xff})
		c.Close()
		if _, err := zmtp.Handshake(open(), zmtp.XPub, nil, zmtp.DefaultLimits); err == nil {
			t.Error("a wrong socket type is welcome")
		}
		own := zmtp.Dealer
		if *port == k.conn.IOPub {
			own = zmtp.Sub
		}
		_, _ = intrude(t, k, *port, own).raw.Write(binary.BigEndian.AppendUint64([]byte{2}, 1<<62))
		intrude(t, k, *port, own).send([]byte{1}, []byte("nonsense"))
	}
	for _, c := range []*client.Client{before, connect(t, k, nil)} {
		if got := run(t, c, code("say a\nresult b")); got.stdout != "a\n" || got.result != "b" {
			t.Errorf("%+v", got)
		}
		if err := c.Beat(limit(t, 2*time.Second)); err != nil {
			t.Error(err)
		}
	}
}

// A subscriber that stops reading, as when its process is stopped, while a cell
// writes more than the system's buffers hold.
func TestStuckSubscriberIsNotNoticed(t *testing.T) {
	k := onNetwork(t, Connection{IP: "127.0.0.1"}, Options{Transport: transport.Options{Patience: 100 * time.Millisecond, Room: 1 << 20}})
	stuck := intrude(t, k, k.conn.IOPub, zmtp.Sub)
	if err := stuck.raw.(*net.TCPConn).SetReadBuffer(4096); err != nil { // the system keeps less for it
		t.Fatal(err)
	}
	stuck.send([]byte{1})
	c := connect(t, k, nil)
	const n, size = 700, 10_000
	got := run(t, c, wire.ExecuteRequest{Code: "flood 700 10000\nresult end"})
	if len(got.stdout) != n*size || got.result != "end" {
		t.Errorf("%d bytes, %+v", len(got.stdout), got.reply)
	}
	var a wire.KernelInfoReply
	if err := c.Ask(limit(t, 2*time.Second), true, "kernel_info_request", struct{}{}, &a); err != nil {
		t.Error(err)
	}
}

func TestHeartbeatUnderLoad(t *testing.T) {
	k := onNetwork(t, Connection{IP: "127.0.0.1"}, Options{})
	c := connect(t, k, nil)
	p, err := c.Send(false, "execute_request", code("spin"))
	if err != nil {
		t.Fatal(err)
	}
	var busy sync.WaitGroup
	stop := make(chan struct{})
	for range runtime.GOMAXPROCS(0) {
		busy.Go(func() {
			for {
				select {
				case <-stop:
					return
				default:
					runtime.GC()
				}
			}
		})
	}
	for range 20 {
		if err := c.Beat(limit(t, time.Second)); err != nil { // after a second clients give a kernel up
			t.Error(err)
		}
	}
	close(stop)
	busy.Wait()
	k.Interrupt()
	finish(t, p)
}

func TestShutdown(t *testing.T) {
	for _, control := range []bool{true, false} {
		for _, busy := range []string{"", "spin", "deaf 1h"} {
			k := onNetwork(t, Connection{IP: "127.0.0.1"}, Options{})
			c := connect(t, k, nil)
			var cells []*client.Pending
			if busy != "" {
				cells = sendAll(t, c, code("let a b\n"+busy), code("say later"))
			}
			time.Sleep(5 * time.Millisecond)
			var a wire.Shutdown
			begun := time.Now()
			if err := c.Ask(limit(t, 5*time.Second), control, "shutdown_request", wire.Shutdown{Restart: true}, &a); err != nil {
				t.Fatalf("%q: %v", busy, err)
			}
			if a.Status != "ok" || !a.Restart {
				t.Errorf("%+v", a)
			}
			<-k.stopped
			if d := time.Since(begun); d > time.Second {
				t.Errorf("%q: it took %v", busy, d)
			}
			if busy == "spin" { // both cells are answered
				if n := finish(t, cells[0]).reply.Name; n != "Interrupted" {
					t.Errorf("the cell: %q", n)
				}
				if n := finish(t, cells[1]).reply.Name; n != "Cancelled" {
					t.Errorf("the cell that waited: %q", n)
				}
			}
			l, err := k.conn.Listen() // the ports are free again
			if err != nil {
				t.Fatal(err)
			}
			for _, l := range []net.Listener{l.Shell, l.Control, l.Stdin, l.IOPub, l.Heartbeat} {
				l.Close()
			}
		}
	}
}

func TestRegistration(t *testing.T) {
	codec, err := wire.NewCodec("", []byte(testKey))
	if err != nil {
		t.Fatal(err)
	}
	for name, reply := range map[string]func(content []byte) []byte{
		"acknowledged": func(b []byte) []byte { return codec.Sign(b) },
		"forged":       func([]byte) []byte { return []byte("no signature") },
	} {
		l, err := transport.Listen(transport.Address{IP: "127.0.0.1"})
		if err != nil {
			t.Fatal(err)
		}
		var told announcement
		r := transport.NewRouter(l, transport.Options{}, func(r *transport.Router, f [][]byte) {
			if len(f) != 4 || string(f[2]) != string(codec.Sign(f[3])) {
				t.Errorf("%q", f)
				return
			}
			_ = json.Unmarshal(f[3], &told)
			ack := []byte(`{"status":"ok"}`)
			r.Send([][]byte{f[0], []byte("<IDS|MSG>"), reply(ack), ack})
		})
		file := filepath.Join(t.TempDir(), "registration.json")
		b, _ := json.Marshal(Registration{KernelID: "k1", Transport: "tcp", IP: "127.0.0.1", Port: l.Addr().(*net.TCPAddr).Port, Key: testKey})
		if err := os.WriteFile(file, b, 0o600); err != nil {
			t.Fatal(err)
		}
		reg, ok, err := ReadRegistration(file)
		if err != nil || !ok {
			t.Fatal(ok, err)
		}
		open, c, err := reg.Register()
		if (err == nil) != (name == "acknowledged") {
			t.Fatalf("%s: %v", name, err)
		}
		if err == nil {
			if told.KernelID != "k1" {
				t.Errorf("%+v", told)
			}
			serve(t, open, Options{Key: []byte(testKey)})
			if got := run(t, connectTo(t, c.dialer(), nil), code("result fine")); got.result != "fine" {
				t.Errorf("%+v", got)
			}
		}
		r.Close(0)
	}
}

func TestConnectionFile(t *testing.T) {
	file := filepath.Join(t.TempDir(), "c.json")
	want := Connection{Transport: "tcp", IP: "127.0.0.1", Shell: 1, Control: 2, Stdin: 3, IOPub: 4, Heartbeat: 5, Key: "k", Scheme: "hmac-sha256"}
	if err := want.Write(file); err != nil {
		t.Fatal(err)
	}
	if got, err := ReadConnection(file); err != nil || got != want {
		t.Errorf("%+v %v", got, err)
	}
	if info, err := os.Stat(file); err != nil || info.Mode().Perm()&0o077 != 0 {
		t.Errorf("others may read it: %v %v", info.Mode(), err)
	}
	if _, ok, err := ReadRegistration(file); ok || err != nil {
		t.Errorf("taken for a registration file: %v %v", ok, err)
	}
	for _, bad := range []string{"", "{}", "[1]", "nonsense"} {
		if err := os.WriteFile(file, []byte(bad), 0o600); err != nil {
			t.Fatal(err)
		}
		if _, err := ReadConnection(file); err == nil {
			t.Errorf("%q is accepted", bad)
		}
	}
}

func BenchmarkCell(b *testing.B) {
	for name, k := range map[string]func() *running{
		"memory": func() *running { return inMemory(b) },
		"tcp":    func() *running { return onNetwork(b, Connection{IP: "127.0.0.1"}, Options{}) },
	} {
		b.Run(name, func(b *testing.B) {
			c := connect(b, k(), nil)
			ctx := context.Background()
			for b.Loop() {
				p, err := c.Send(false, "execute_request", code("result 2"))
				if err != nil {
					b.Fatal(err)
				}
				if _, err := p.Wait(ctx, nil); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
