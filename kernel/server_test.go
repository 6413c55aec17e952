package kernel

import (
	"context"
	"encoding/json"
	"log"
	"net"
	"os"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"adjoin/kernel/client"
	"adjoin/kernel/transport"
	"adjoin/kernel/wire"
)

const testKey = "key of the tests"

// running is a kernel with the toy language in this process.
type running struct {
	*Server
	client.Dialer
	conn    Connection // of a kernel on the network
	stopped chan struct{}
}

func (r *running) close() {
	r.stop()
	<-r.stopped
}

func serve(t testing.TB, l Listeners, o Options) *running {
	t.Helper()
	if o.Engine == nil {
		o.Engine = newToy()
	}
	if testing.Verbose() {
		o.Log = log.New(os.Stderr, "kernel: ", 0)
	}
	s, err := NewServer(l, o)
	if err != nil {
		t.Fatal(err)
	}
	r := &running{Server: s, stopped: make(chan struct{})}
	go func() {
		s.Serve(context.Background())
		close(r.stopped)
	}()
	t.Cleanup(r.close)
	return r
}

// inMemory starts a kernel without a network.
func inMemory(t testing.TB) *running {
	t.Helper()
	shell, control, stdin, iopub, hb := transport.NewMemory(), transport.NewMemory(), transport.NewMemory(), transport.NewMemory(), transport.NewMemory()
	r := serve(t, Listeners{shell, control, stdin, iopub, hb}, Options{Key: []byte(testKey)})
	r.Dialer = client.Dialer{Shell: shell.Dial, Control: control.Dial, IOPub: iopub.Dial, Heartbeat: hb.Dial}
	return r
}

// onNetwork starts a kernel on a loopback address.
func onNetwork(t testing.TB, c Connection, o Options) *running {
	t.Helper()
	c.Key = testKey
	l, err := c.Listen()
	if err != nil {
		t.Fatal(err)
	}
	o.Key = []byte(testKey)
	r := serve(t, l, o)
	r.conn = c
	r.Dialer = c.dialer()
	return r
}

func (c Connection) dialer() client.Dialer {
	to := func(port int) func() (net.Conn, error) {
		return func() (net.Conn, error) { return c.Dial(port) }
	}
	return client.Dialer{Shell: to(c.Shell), Control: to(c.Control), IOPub: to(c.IOPub), Heartbeat: to(c.Heartbeat)}
}

func connect(t testing.TB, r *running, tap func(*wire.Message)) *client.Client {
	t.Helper()
	return connectTo(t, r.Dialer, tap)
}

func connectTo(t testing.TB, d client.Dialer, tap func(*wire.Message)) *client.Client {
	t.Helper()
	c, err := client.Connect(limit(t, 5*time.Second), d, client.Options{Key: []byte(testKey), Tap: tap})
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(c.Close)
	return c
}

// limit is a context for what must not take longer, that a test which hangs
// may fail.
func limit(t testing.TB, d time.Duration) context.Context {
	ctx, cancel := context.WithTimeout(context.Background(), d)
	t.Cleanup(cancel)
	return ctx
}

// cell is what came of one cell.
type cell struct {
	kinds  []string // types of the broadcasts, a status with its state
	stdout string
	result string
	reply  struct {
		Status          string                     `json:"status"`
		Count           int                        `json:"execution_count"`
		Name            string                     `json:"ename"`
		Value           string                     `json:"evalue"`
		Payload         []wire.Page                `json:"payload"`
		UserExpressions map[string]json.RawMessage `json:"user_expressions"`
	}
}

func run(t testing.TB, c *client.Client, q wire.ExecuteRequest) cell {
	t.Helper()
	p, err := c.Send(false, "execute_request", q)
	if err != nil {
		t.Fatal(err)
	}
	return finish(t, p)
}

func finish(t testing.TB, p *client.Pending) cell {
	t.Helper()
	var got cell
	var stdout strings.Builder
	reply, err := p.Wait(limit(t, 20*time.Second), func(a client.Arrival) {
		if !a.Broadcast {
			return
		}
		var b struct {
			State string            `json:"execution_state"`
			Name  string            `json:"name"`
			Text  string            `json:"text"`
			Data  map[string]string `json:"data"`
		}
		_ = json.Unmarshal(a.Content, &b)
		kind := a.Header.Type
		switch {
		case kind == "status":
			kind = b.State
		case b.Name == "stdout":
			stdout.WriteString(b.Text)
		case kind == "execute_result":
			got.result = b.Data["text/plain"]
		}
		got.kinds = append(got.kinds, kind)
	})
	if err != nil {
		t.Fatal(err)
	}
	got.stdout = stdout.String()
	if err := json.Unmarshal(reply.Content, &got.reply); err != nil {
		t.Fatal(err)
	}
	return got
}

func code(s string) wire.ExecuteRequest { return wire.ExecuteRequest{Code: s} }

func TestHello(t *testing.T) {
	for name, start := range map[string]func(t *testing.T) *running{
		"memory": func(t *testing.T) *running { return inMemory(t) },
		"tcp":    func(t *testing.T) *running { return onNetwork(t, Connection{IP: "127.0.0.1"}, Options{}) },
		"ipc": func(t *testing.T) *running {
			dir, err := os.MkdirTemp("", "k") // t.TempDir is too long a path for a socket
			if err != nil {
				t.Fatal(err)
			}
			t.Cleanup(func() { os.RemoveAll(dir) })
			return onNetwork(t, Connection{Transport: "ipc", IP: filepath.Join(dir, "s")}, Options{})
		},
	} {
		t.Run(name, func(t *testing.T) {
			c := connect(t, start(t), nil)
			var info wire.KernelInfoReply
			for _, control := range []bool{false, true} {
				if err := c.Ask(limit(t, 5*time.Second), control, "kernel_info_request", struct{}{}, &info); err != nil {
					t.Fatal(err)
				}
				if info.Status != "ok" || info.LanguageInfo.Name != "toy" || info.ProtocolVersion != "5.5" {
					t.Errorf("%+v", info)
				}
			}
			got := run(t, c, code("say hello, world\nresult 42"))
			if got.stdout != "hello, world\n" || got.result != "42" || got.reply.Count != 1 || got.reply.Status != "ok" {
				t.Errorf("%+v", got)
			}
			if err := c.Beat(limit(t, 5*time.Second)); err != nil {
				t.Error(err)
			}
		})
	}
}

// recorder keeps all broadcasts.
type recorder struct {
	mu       sync.Mutex
	messages []*wire.Message
}

func (r *recorder) tap(m *wire.Message) {
	r.mu.Lock()
	defer r.mu.Unlock()
	r.messages = append(r.messages, m)
}

func (r *recorder) all() []*wire.Message {
	r.mu.Lock()
	defer r.mu.Unlock()
	return append([]*wire.Message(nil), r.messages...)
}
