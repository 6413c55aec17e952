// Package jupytertest runs the kernel under Jupyter itself: the official
// conformance suite, the notebook runner and exporter, and JupyterLab in a
// browser. It has tests only; they make a Python environment of their own.
package jupytertest

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"io"
	"net"
	"net/http"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"syscall"
	"testing"
	"time"

	"adjoin/algebra/algtest/outside"
)

// room is a place where Jupyter finds the kernel and nothing else of the user.
type room struct {
	python, dir string
	env         []string
}

// build makes the program and installs its kernelspec into a fresh room.
func build(t *testing.T) room {
	t.Helper()
	r := room{python: outside.Python(t, "requirements.txt"), dir: t.TempDir()}
	program := filepath.Join(r.dir, "adjoin")
	if out, err := exec.Command("go", "build", "-o", program, "../cmd/adjoin").CombinedOutput(); err != nil {
		t.Fatalf("%v\n%s", err, out)
	}
	r.env = append(os.Environ(),
		"HOME="+r.dir,
		"JUPYTER_PATH="+filepath.Join(r.dir, "share", "jupyter"),
		"JUPYTER_DATA_DIR="+filepath.Join(r.dir, "data"),
		"JUPYTER_CONFIG_DIR="+filepath.Join(r.dir, "config"),
		"JUPYTER_RUNTIME_DIR="+filepath.Join(r.dir, "runtime"),
		"ADJOIN_HISTORY="+filepath.Join(r.dir, "history"),
		"PYTHONWARNINGS=ignore",
	)
	install := exec.Command(program, "install", "--copy", "--prefix", r.dir)
	install.Env = r.env
	if out, err := install.CombinedOutput(); err != nil {
		t.Fatalf("install: %v\n%s", err, out)
	}
	return r
}

// run runs a Python file in the room and fails the test when it fails.
func (r room) run(t *testing.T, args ...string) {
	t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), 10*time.Minute)
	defer cancel()
	c := exec.CommandContext(ctx, r.python, args...)
	c.Env = r.env
	out, err := c.CombinedOutput()
	t.Logf("%s", out)
	if err != nil {
		t.Fatalf("%s: %v", args[0], err)
	}
}

// demos is the demo notebooks, and a copy of them in the room.
func (r room) demos(t *testing.T) (paths, names []string) {
	t.Helper()
	found, err := filepath.Glob("../../notebooks-demo/*.ipynb")
	if err != nil || len(found) == 0 {
		t.Fatalf("no demo notebooks: %v", err)
	}
	for _, path := range found {
		if strings.HasSuffix(path, "-run.ipynb") {
			continue // left by the first command of the README
		}
		text, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		name := filepath.Base(path)
		to := filepath.Join(r.dir, name)
		if err := os.WriteFile(to, text, 0o644); err != nil {
			t.Fatal(err)
		}
		paths, names = append(paths, to), append(names, name)
	}
	return paths, names
}

// artifacts is where pictures and pages are left to be looked at.
func artifacts(t *testing.T) string {
	dir := os.Getenv("ADJOIN_ARTIFACTS")
	if dir == "" {
		return t.TempDir()
	}
	if err := os.MkdirAll(dir, 0o755); err != nil {
		t.Fatal(err)
	}
	return dir
}

// jupyter_kernel_test 0.7, the conformance suite of the Jupyter project.
func TestConformance(t *testing.T) {
	build(t).run(t, "conformance.py")
}

func TestDemosInNbclientAndNbconvert(t *testing.T) {
	r := build(t)
	paths, _ := r.demos(t)
	r.run(t, append([]string{"notebooks.py", artifacts(t)}, paths...)...)
}

func TestDemosInJupyterLab(t *testing.T) {
	r := build(t)
	chromium := outside.Program(t, "chromium", "chromium-browser", "google-chrome")
	paths, names := r.demos(t)
	for _, path := range paths {
		strip(t, path)
	}
	// All cells in the page at once, and no questions about news.
	for name, text := range map[string]string{
		"notebook-extension/tracker":      `{"windowingMode": "none"}`,
		"apputils-extension/notification": `{"fetchNews": "false", "checkForUpdates": false}`,
	} {
		file := filepath.Join(r.dir, "config", "lab", "user-settings", "@jupyterlab", name+".jupyterlab-settings")
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	port, token := freePort(t), "adjoin"
	server := exec.Command(r.python, "-m", "jupyterlab", "--no-browser", "--allow-root", "--ip=127.0.0.1",
		fmt.Sprintf("--port=%d", port), "--ServerApp.port_retries=0", "--IdentityProvider.token="+token,
		"--LabApp.news_url=", "--LabApp.check_for_updates_class=jupyterlab.NeverCheckForUpdate",
		"--ServerApp.root_dir="+r.dir)
	server.Env, server.Dir = r.env, r.dir
	var log bytes.Buffer
	server.Stdout, server.Stderr = &log, &log
	if err := server.Start(); err != nil {
		t.Fatal(err)
	}
	defer func() {
		server.Process.Signal(syscall.SIGTERM)
		kill := time.AfterFunc(10*time.Second, func() { server.Process.Kill() })
		server.Wait()
		kill.Stop()
		if t.Failed() {
			t.Logf("server log:\n%s", log.Bytes())
		}
	}()
	waitFor(t, fmt.Sprintf("http://127.0.0.1:%d/api/status?token=%s", port, token))
	r.run(t, append([]string{"browser.py", chromium, fmt.Sprint(port), token, artifacts(t)}, names...)...)
}

// strip takes the outputs from a notebook, so that what the page shows is new.
func strip(t *testing.T, path string) {
	t.Helper()
	text, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	var notebook map[string]any
	if err := json.Unmarshal(text, &notebook); err != nil {
		t.Fatal(err)
	}
	for _, cell := range notebook["cells"].([]any) {
		if c := cell.(map[string]any); c["cell_type"] == "code" {
			c["outputs"], c["execution_count"] = []any{}, nil
		}
	}
	if text, err = json.Marshal(notebook); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(path, text, 0o644); err != nil {
		t.Fatal(err)
	}
}

func freePort(t *testing.T) int {
	l, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	defer l.Close()
	return l.Addr().(*net.TCPAddr).Port
}

func waitFor(t *testing.T, url string) {
	for range 300 {
		if resp, err := http.Get(url); err == nil {
			io.Copy(io.Discard, resp.Body)
			resp.Body.Close()
			if resp.StatusCode == http.StatusOK {
				return
			}
		}
		time.Sleep(200 * time.Millisecond)
	}
	t.Fatal("the server did not start")
}
