package main

import (
	"context"
	"crypto/rand"
	"fmt"
	"time"

	"adjoin/eval"
	"adjoin/kernel"
	"adjoin/kernel/client"
	"adjoin/kernel/engine"
	"adjoin/kernel/transport"
)

// host is a kernel in this process and a client of it: the same messages flow
// as between Jupyter and a kernel, through pipes.
type host struct {
	server *kernel.Server
	client *client.Client
	end    context.CancelFunc
	ended  chan struct{}
}

func newHost(o eval.Options) (*host, error) {
	key := []byte(rand.Text())
	shell, control, stdin, iopub, beat := transport.NewMemory(), transport.NewMemory(), transport.NewMemory(), transport.NewMemory(), transport.NewMemory()
	server, err := kernel.NewServer(
		kernel.Listeners{Shell: shell, Control: control, Stdin: stdin, IOPub: iopub, Heartbeat: beat},
		kernel.Options{Engine: engine.New(o), Key: key})
	if err != nil {
		return nil, err
	}
	ctx, end := context.WithCancel(context.Background())
	h := &host{server: server, end: end, ended: make(chan struct{})}
	go func() {
		server.Serve(ctx)
		close(h.ended)
	}()
	wait, cancel := context.WithTimeout(ctx, 10*time.Second)
	defer cancel()
	d := client.Dialer{Shell: shell.Dial, Control: control.Dial, IOPub: iopub.Dial, Heartbeat: beat.Dial}
	if h.client, err = client.Connect(wait, d, client.Options{Key: key}); err != nil {
		h.close()
		return nil, fmt.Errorf("the kernel does not start: %w", err)
	}
	return h, nil
}

func (h *host) close() {
	if h.client != nil {
		h.client.Close()
	}
	h.end()
	<-h.ended
}
