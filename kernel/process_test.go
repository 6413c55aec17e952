//go:build unix

package kernel

import (
	"fmt"
	"log"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
	"time"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

// The test binary is a kernel with the toy language when it is told a
// connection file, and a parent that starts one and waits when it is told so.
const (
	beKernel = "ADJOIN_TEST_KERNEL"
	beParent = "ADJOIN_TEST_PARENT"
)

func TestMain(m *testing.M) {
	if file := os.Getenv(beKernel); file != "" && os.Getenv(beParent) == "" {
		c, err := ReadConnection(file)
		if err == nil {
			err = Run(&c, Options{Engine: newToy()})
		}
		if err != nil {
			log.Fatal(err)
		}
		os.Exit(0)
	}
	if os.Getenv(beParent) != "" {
		child := exec.Command(os.Args[0])
		child.Env = append(os.Environ(), beParent+"=", fmt.Sprintf("JPY_PARENT_PID=%d", os.Getpid()))
		if err := child.Start(); err != nil {
			log.Fatal(err)
		}
		fmt.Println(child.Process.Pid)
		time.Sleep(time.Hour)
	}
	os.Exit(m.Run())
}

// process is a kernel in a process of its own.
type process struct {
	*exec.Cmd
	conn   Connection
	exited chan error
}

func start(t testing.TB, c Connection, env ...string) *process {
	t.Helper()
	c.Key = testKey
	if c.Shell == 0 {
		l, err := c.Listen() // to find free ports
		if err != nil {
			t.Fatal(err)
		}
		for _, close := range []func() error{l.Shell.Close, l.Control.Close, l.Stdin.Close, l.IOPub.Close, l.Heartbeat.Close} {
			_ = close()
		}
	}
	file := filepath.Join(t.TempDir(), "c.json")
	if err := c.Write(file); err != nil {
		t.Fatal(err)
	}
	p := &process{Cmd: exec.Command(os.Args[0]), conn: c, exited: make(chan error, 1)}
	p.Env = append(append(os.Environ(), beKernel+"="+file), env...)
	p.SysProcAttr = &syscall.SysProcAttr{Setpgid: true}
	out, err := p.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := p.Start(); err != nil {
		t.Fatal(err)
	}
	if len(env) > 0 {
		var pid int
		_, _ = fmt.Fscan(out, &pid)
		t.Cleanup(func() { _ = syscall.Kill(pid, syscall.SIGKILL) })
	}
	go func() { p.exited <- p.Wait() }()
	t.Cleanup(func() { _ = p.Process.Kill() })
	return p
}

func (p *process) connect(t testing.TB) *client.Client {
	t.Helper()
	for end := time.Now().Add(10 * time.Second); ; time.Sleep(5 * time.Millisecond) {
		c, err := client.Connect(limit(t, 10*time.Second), p.conn.dialer(), client.Options{Key: []byte(testKey)})
		if err == nil {
			t.Cleanup(c.Close)
			return c
		}
		if time.Now().After(end) {
			t.Fatal(err)
		}
	}
}

func (p *process) wait(t testing.TB) error {
	t.Helper()
	select {
	case err := <-p.exited:
		return err
	case <-time.After(3 * time.Second):
		t.Fatal("the kernel does not end")
		return nil
	}
}

func TestSignals(t *testing.T) {
	p := start(t, Connection{IP: "127.0.0.1"})
	c := p.connect(t)
	run(t, c, code("let x kept"))
	_ = p.Process.Signal(os.Interrupt) // when idle, for nobody
	time.Sleep(20 * time.Millisecond)
	for range 3 {
		cell := sendAll(t, c, code("spin"))[0]
		time.Sleep(20 * time.Millisecond)
		_ = p.Process.Signal(os.Interrupt)
		_ = p.Process.Signal(os.Interrupt)
		if got := finish(t, cell); got.reply.Name != "Interrupted" {
			t.Errorf("%+v", got.reply)
		}
	}
	if got := run(t, c, code("get x")); got.result != "kept" {
		t.Errorf("%+v", got)
	}
	sendAll(t, c, code("spin"))
	_ = p.Process.Signal(syscall.SIGTERM)
	if err := p.wait(t); err != nil {
		t.Errorf("SIGTERM: %v", err)
	}
}

func TestParentDeath(t *testing.T) {
	p := start(t, Connection{IP: "127.0.0.1"}, beParent+"=1")
	c := p.connect(t)
	if got := run(t, c, code("result fine")); got.result != "fine" {
		t.Errorf("%+v", got)
	}
	time.Sleep(1100 * time.Millisecond) // it must not take a living parent for dead
	run(t, c, code("result fine"))
	_ = p.Process.Kill()
	begun := time.Now()
	waitFor(t, func() bool {
		raw, err := p.conn.Dial(p.conn.Shell)
		if err == nil {
			raw.Close()
		}
		return err != nil
	})
	t.Logf("noticed after %v", time.Since(begun).Round(time.Millisecond))
}

func TestRestartOverIPC(t *testing.T) {
	dir, err := os.MkdirTemp("", "k")
	if err != nil {
		t.Fatal(err)
	}
	defer os.RemoveAll(dir)
	conn := Connection{Transport: "ipc", IP: filepath.Join(dir, "s"), Shell: 1, Control: 2, Stdin: 3, IOPub: 4, Heartbeat: 5}
	for range 3 {
		p := start(t, conn)
		if got := run(t, p.connect(t), code("result fine")); got.result != "fine" {
			t.Errorf("%+v", got)
		}
		_ = p.Process.Kill()
		<-p.exited
	}
	if left, _ := filepath.Glob(filepath.Join(dir, "*")); len(left) != 5 {
		t.Errorf("a killed kernel leaves %v", left)
	}
	p := start(t, conn)
	var a wire.Shutdown
	if err := p.connect(t).Ask(limit(t, 5*time.Second), true, "shutdown_request", wire.Shutdown{}, &a); err != nil {
		t.Fatal(err)
	}
	if err := p.wait(t); err != nil {
		t.Error(err)
	}
	if left, _ := filepath.Glob(filepath.Join(dir, "*")); len(left) != 0 {
		t.Errorf("a kernel that ended leaves %v", strings.Join(left, " "))
	}
}
