package jupytertest

import (
	"context"
	"crypto/rand"
	"encoding/json"
	"net"
	"os"
	"os/exec"
	"path/filepath"
	"sync"
	"testing"
	"time"

	"adjoin/kernel"
	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

// program builds adjoin once for all tests of the package and returns its path.
func program(t testing.TB) string {
	t.Helper()
	path, err := built()
	if err != nil {
		t.Fatal(err)
	}
	return path
}

var (
	builtIn string
	built   = sync.OnceValues(func() (string, error) {
		dir, err := os.MkdirTemp("", "adjoin-jupytertest-")
		if err != nil {
			return "", err
		}
		builtIn = dir
		path := filepath.Join(dir, "adjoin")
		c := exec.Command("go", "build", "-o", path, "../cmd/adjoin")
		c.Stderr = os.Stderr
		return path, c.Run()
	})
)

func TestMain(m *testing.M) {
	code := m.Run()
	if builtIn != "" {
		os.RemoveAll(builtIn)
	}
	os.Exit(code)
}

// session is a kernel in a process of its own, and a client of it.
type session struct {
	process *exec.Cmd
	client  *client.Client
}

// start starts a kernel as Jupyter would, and waits until it has answered a
// kernel_info_request.
func start(t testing.TB, flags ...string) session {
	t.Helper()
	path := program(t)
	c := kernel.Connection{Transport: "tcp", IP: "127.0.0.1", Key: rand.Text(), Scheme: "hmac-sha256", KernelName: "adjoin"}
	l, err := c.Listen() // to find free ports
	if err != nil {
		t.Fatal(err)
	}
	for _, open := range []net.Listener{l.Shell, l.Control, l.Stdin, l.IOPub, l.Heartbeat} {
		open.Close()
	}
	file := filepath.Join(t.TempDir(), "connection.json")
	if err := c.Write(file); err != nil {
		t.Fatal(err)
	}
	s := session{process: exec.Command(path, append([]string{"kernel", "--connection-file", file}, flags...)...)}
	s.process.Env = append(os.Environ(), "ADJOIN_HISTORY=none")
	if err := s.process.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(s.stop)
	to := func(port int) func() (net.Conn, error) { return func() (net.Conn, error) { return c.Dial(port) } }
	d := client.Dialer{Shell: to(c.Shell), Control: to(c.Control), IOPub: to(c.IOPub), Heartbeat: to(c.Heartbeat)}
	ctx, cancel := context.WithTimeout(context.Background(), 30*time.Second)
	defer cancel()
	for {
		if s.client, err = client.Connect(ctx, d, client.Options{Key: []byte(c.Key)}); err == nil {
			break
		}
		if ctx.Err() != nil {
			t.Fatal(err)
		}
		time.Sleep(time.Millisecond)
	}
	var info wire.KernelInfoReply
	if err := s.client.Ask(ctx, false, "kernel_info_request", struct{}{}, &info); err != nil {
		t.Fatal(err)
	}
	return s
}

func (s session) stop() {
	if s.client != nil {
		s.client.Close()
	}
	s.process.Process.Kill()
	s.process.Wait()
}

// outcome is what came back for a cell.
type outcome struct {
	Name      string   `json:"ename"`
	Reason    string   `json:"evalue"`
	Traceback []string `json:"traceback"`
	result    string
}

// run runs a cell and waits for its reply and for idle.
func (s session) run(t testing.TB, code string) (o outcome) {
	t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), time.Minute)
	defer cancel()
	p, err := s.client.Send(false, "execute_request", wire.ExecuteRequest{Code: code, StoreHistory: new(true)})
	if err != nil {
		t.Fatal(err)
	}
	reply, err := p.Wait(ctx, func(a client.Arrival) {
		var d wire.DisplayData
		if a.Header.Type == "execute_result" && json.Unmarshal(a.Content, &d) == nil {
			o.result, _ = d.Data["text/plain"].(string)
		}
	})
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(reply.Content, &o); err != nil {
		t.Fatal(err)
	}
	return o
}
