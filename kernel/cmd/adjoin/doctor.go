package main

import (
	"context"
	"crypto/rand"
	"encoding/json"
	"fmt"
	"io"
	"net"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"time"

	"github.com/spf13/cobra"

	"adjoin/kernel"
	"adjoin/kernel/client"
	"adjoin/kernel/engine"
	"adjoin/kernel/wire"
	"adjoin/kernelspec"
)

// finding is one thing that the doctor has looked at.
type finding struct {
	Subject string `json:"subject"`
	Level   string `json:"level"` // ok, note or trouble
	Text    string `json:"text"`
	Remedy  string `json:"remedy,omitempty"`
}

const (
	fine    = "ok"
	note    = "note"
	trouble = "trouble"
)

func doctorCommand() *cobra.Command {
	var asJSON bool
	c := &cobra.Command{
		Use:   "doctor",
		Short: "Find out why Jupyter does not run the kernel",
		Long: `Shows where Jupyter looks for kernels and what it finds there, compares
versions, and starts this program as a kernel and talks to it as Jupyter would.

Exit status: 0 when all is well, 1 when something needs mending.`,
		Example: "  adjoin doctor\n  adjoin doctor --json",
		Args:    noArgs,
		RunE: func(c *cobra.Command, _ []string) error {
			findings := examine()
			if asJSON {
				if err := writeJSON(c.OutOrStdout(), findings); err != nil {
					return err
				}
			} else {
				tell(c.OutOrStdout(), findings)
			}
			for _, f := range findings {
				if f.Level == trouble {
					return failed{}
				}
			}
			return nil
		},
	}
	c.Flags().BoolVar(&asJSON, "json", false, "print the findings as JSON")
	return c
}

func examine() []finding {
	program, err := os.Executable()
	if err != nil {
		program = os.Args[0]
	}
	findings := []finding{{"this program", fine, program + ", version " + engine.Version, ""}}
	findings = append(findings, jupyter())
	findings = append(findings, places(program)...)
	return append(findings, selfTest(program)...)
}

func tell(w io.Writer, findings []finding) {
	for _, f := range findings {
		colour := map[string]string{fine: green, note: yellow, trouble: red}[f.Level]
		fmt.Fprintf(w, "%s  %s: %s\n", paint(w, colour, fmt.Sprintf("%-7s", f.Level)), f.Subject, f.Text)
		if f.Remedy != "" {
			fmt.Fprintf(w, "         %s\n", f.Remedy)
		}
	}
}

// jupyter says which Jupyter is on the path.
func jupyter() finding {
	path, err := exec.LookPath("jupyter")
	if err != nil {
		return finding{"Jupyter", note, "the command jupyter is not on the path", "notebooks need it: pip install jupyterlab; adjoin run and adjoin eval work without"}
	}
	ctx, cancel := context.WithTimeout(context.Background(), 20*time.Second)
	defer cancel()
	out, err := exec.CommandContext(ctx, path, "--version").Output()
	if err != nil {
		return finding{"Jupyter", note, path + " does not tell its version: " + err.Error(), ""}
	}
	var versions []string
	for line := range strings.Lines(string(out)) {
		name, v, ok := strings.Cut(line, ":")
		switch name = strings.TrimSpace(name); name {
		case "jupyter_client", "jupyter_core", "jupyterlab", "notebook":
			if v = strings.TrimSpace(v); ok && v != "not installed" {
				versions = append(versions, name+" "+v)
			}
		}
	}
	return finding{"Jupyter", fine, path + ", " + strings.Join(versions, ", "), ""}
}

// places says where Jupyter looks and what it finds of ours.
func places(program string) []finding {
	list := kernelspec.Here().Places()
	var findings []finding
	for _, p := range list {
		text := p.Path
		if info, err := os.Stat(filepath.Join(p.Path, "kernels")); err != nil || !info.IsDir() {
			text += " (has no kernels)"
		}
		findings = append(findings, finding{"Jupyter looks in (" + p.Kind + ")", fine, text, ""})
	}
	ours := 0
	for _, k := range kernelspec.Find(list) {
		switch {
		case k.Err != nil:
			findings = append(findings, finding{"kernel " + k.Name, note, "cannot be read: " + k.Err.Error(), ""})
		case k.Spec.Ours():
			ours++
			findings = append(findings, installed(k, program))
		default:
			findings = append(findings, finding{"kernel " + k.Name, fine, k.Dir + ", another language: " + k.Spec.Language, ""})
		}
	}
	if ours == 0 {
		findings = append(findings, finding{"kernel adjoin", trouble, "Jupyter does not find it", "adjoin install"})
	}
	return findings
}

// installed judges a kernelspec of ours.
func installed(k kernelspec.Found, program string) finding {
	f := finding{Subject: "kernel " + k.Name, Level: fine, Text: k.Dir}
	start := ""
	if len(k.Spec.Argv) > 0 {
		start = strings.ReplaceAll(k.Spec.Argv[0], "{resource_dir}", k.Dir)
	}
	info, err := os.Stat(start)
	mine, _ := os.Stat(program)
	switch {
	case err != nil:
		f.Level, f.Text, f.Remedy = trouble, fmt.Sprintf("%s starts %s, which is not there", k.Dir, start), "adjoin install, with the flags it was installed with"
	case k.Hidden:
		f.Level, f.Text, f.Remedy = note, k.Dir+" is hidden by one of the same name in an earlier place", "adjoin uninstall, or another --name"
	case k.Spec.Version() != engine.Version:
		f.Level, f.Text = note, fmt.Sprintf("%s was installed by version %s, this is %s", k.Dir, k.Spec.Version(), engine.Version)
		f.Remedy = "adjoin install, with the flags it was installed with"
	case mine == nil || !os.SameFile(info, mine):
		f.Level, f.Text = note, fmt.Sprintf("%s starts another program than this one: %s", k.Dir, start)
	}
	return f
}

// selfTest starts the program as Jupyter would and talks to it over the
// network.
func selfTest(program string) []finding {
	const subject = "self-test"
	fail := func(what string, err error) []finding {
		return []finding{{subject, trouble, what + ": " + err.Error(), "please report this"}}
	}
	dir, err := os.MkdirTemp("", "adjoin-doctor-")
	if err != nil {
		return fail("no temporary folder", err)
	}
	defer os.RemoveAll(dir)
	c, err := freePorts()
	if err != nil {
		return fail("no free ports", err)
	}
	file := filepath.Join(dir, "connection.json")
	if err := c.Write(file); err != nil {
		return fail("the connection file", err)
	}
	ctx, cancel := context.WithTimeout(context.Background(), 30*time.Second)
	defer cancel()
	process := exec.CommandContext(ctx, program, "kernel", "--connection-file", file)
	process.Env = append(os.Environ(), "ADJOIN_HISTORY=none")
	begun := time.Now()
	if err := process.Start(); err != nil {
		return fail("the kernel does not start", err)
	}
	exited := make(chan error, 1)
	go func() { exited <- process.Wait() }()
	defer func() {
		_ = process.Process.Kill()
	}()
	k, err := connect(ctx, c)
	if err != nil {
		return fail("the kernel cannot be reached", err)
	}
	defer k.Close()
	var info wire.KernelInfoReply
	if err := k.Ask(ctx, false, "kernel_info_request", struct{}{}, &info); err != nil {
		return fail("kernel_info_request", err)
	}
	started := time.Since(begun)
	text, took, err := ask(ctx, k)
	if err != nil {
		return fail("execute_request", err)
	}
	if text != "42" {
		return fail("execute_request", fmt.Errorf("6*7 is %q", text))
	}
	if err := k.Beat(ctx); err != nil {
		return fail("heartbeat", err)
	}
	var bye wire.Shutdown
	p, err := k.Send(true, "shutdown_request", wire.Shutdown{})
	if err != nil {
		return fail("shutdown_request", err)
	}
	reply, err := p.Wait(ctx, nil)
	if err != nil {
		return fail("shutdown_request", err)
	}
	if err := json.Unmarshal(reply.Content, &bye); err != nil || bye.Status != wire.StatusOK {
		return fail("shutdown_request", fmt.Errorf("the answer is %s", reply.Content))
	}
	select {
	case err := <-exited:
		if err != nil {
			return fail("the kernel ends badly", err)
		}
	case <-ctx.Done():
		return fail("shutdown_request", fmt.Errorf("the kernel does not end"))
	}
	return []finding{{subject, fine, fmt.Sprintf("the kernel answered %v after its start, 6*7 took %v, it ended when asked",
		started.Round(time.Millisecond), took.Round(10*time.Microsecond)), ""}}
}

// ask lets the kernel compute.
func ask(ctx context.Context, k *client.Client) (text string, took time.Duration, err error) {
	begun := time.Now()
	p, err := k.Send(false, "execute_request", wire.ExecuteRequest{Code: "6*7"})
	if err != nil {
		return "", 0, err
	}
	_, err = p.Wait(ctx, func(a client.Arrival) {
		var d wire.DisplayData
		if a.Header.Type == "execute_result" && json.Unmarshal(a.Content, &d) == nil {
			text, _ = d.Data["text/plain"].(string)
		}
	})
	return text, time.Since(begun), err
}

// connect waits for the kernel to open its channels.
func connect(ctx context.Context, c kernel.Connection) (*client.Client, error) {
	to := func(port int) func() (net.Conn, error) { return func() (net.Conn, error) { return c.Dial(port) } }
	d := client.Dialer{Shell: to(c.Shell), Control: to(c.Control), IOPub: to(c.IOPub), Heartbeat: to(c.Heartbeat)}
	for {
		k, err := client.Connect(ctx, d, client.Options{Key: []byte(c.Key)})
		if err == nil || ctx.Err() != nil {
			return k, err
		}
		time.Sleep(2 * time.Millisecond)
	}
}

// freePorts is a connection on five ports that are free now.
func freePorts() (kernel.Connection, error) {
	c := kernel.Connection{Transport: "tcp", IP: "127.0.0.1", Key: rand.Text(), Scheme: "hmac-sha256", KernelName: "adjoin"}
	l, err := c.Listen()
	if err != nil {
		return c, err
	}
	for _, open := range []net.Listener{l.Shell, l.Control, l.Stdin, l.IOPub, l.Heartbeat} {
		open.Close()
	}
	return c, nil
}
