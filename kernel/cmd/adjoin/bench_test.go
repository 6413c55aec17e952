package main

import (
	"context"
	"os"
	"os/exec"
	"path/filepath"
	"testing"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

// launch starts the program as a kernel and waits for its first reply.
func launch(b *testing.B) (*exec.Cmd, *client.Client) {
	b.Helper()
	c, err := freePorts()
	if err != nil {
		b.Fatal(err)
	}
	file := filepath.Join(b.TempDir(), "c.json")
	if err := c.Write(file); err != nil {
		b.Fatal(err)
	}
	p := exec.Command(os.Args[0], "kernel", "--connection-file", file)
	p.Env = append(os.Environ(), beProgram+"=1", "ADJOIN_HISTORY=none")
	if err := p.Start(); err != nil {
		b.Fatal(err)
	}
	k, err := connect(context.Background(), c)
	if err != nil {
		b.Fatal(err)
	}
	var info wire.KernelInfoReply
	if err := k.Ask(context.Background(), false, "kernel_info_request", struct{}{}, &info); err != nil {
		b.Fatal(err)
	}
	return p, k
}

func end(b *testing.B, p *exec.Cmd, k *client.Client) {
	b.Helper()
	k.Close()
	_ = p.Process.Kill()
	_ = p.Wait()
}

// From the start of the process to the first kernel_info reply.
func BenchmarkStart(b *testing.B) {
	for b.Loop() {
		p, k := launch(b)
		b.StopTimer()
		end(b, p, k)
		b.StartTimer()
	}
}

// 1+1 from request to idle, over TCP to another process.
func BenchmarkCell(b *testing.B) {
	p, k := launch(b)
	defer end(b, p, k)
	for b.Loop() {
		r, err := k.Send(false, "execute_request", wire.ExecuteRequest{Code: "1+1"})
		if err != nil {
			b.Fatal(err)
		}
		if _, err := r.Wait(context.Background(), nil); err != nil {
			b.Fatal(err)
		}
	}
}
