package kernel

import (
	"context"
	"os"
	"os/signal"
	"syscall"
	"time"
)

// Run serves the connection as a process that a notebook server has started:
// SIGINT interrupts the cell that runs, SIGTERM and the parent's death end the
// kernel, and so does a client's request. It returns when the kernel has ended.
func Run(c *Connection, o Options) error {
	l, err := c.Listen()
	if err != nil {
		return err
	}
	return RunOn(l, *c, o)
}

// RunOn is Run on channels that are open already.
func RunOn(l Listeners, c Connection, o Options) error {
	o.Scheme, o.Key = c.Scheme, []byte(c.Key)
	s, err := NewServer(l, o)
	if err != nil {
		return err
	}
	ctx, cancel := signal.NotifyContext(context.Background(), syscall.SIGTERM)
	defer cancel()
	interrupts := make(chan os.Signal, 1)
	signal.Notify(interrupts, os.Interrupt)
	defer signal.Stop(interrupts)
	go func() {
		for range interrupts {
			s.Interrupt()
		}
	}()
	if os.Getenv("JPY_PARENT_PID") != "" {
		go watchParent(ctx, cancel)
	}
	s.Serve(ctx)
	return nil
}

// watchParent calls orphaned when the process that started this one is gone.
// The system then gives this one another parent, which need not be the first
// process of all; a parent that is the first process from the beginning, as in
// a container, never changes.
func watchParent(ctx context.Context, orphaned func()) {
	parent := os.Getppid()
	tick := time.NewTicker(time.Second)
	defer tick.Stop()
	for {
		select {
		case <-ctx.Done():
			return
		case <-tick.C:
			if os.Getppid() != parent {
				orphaned()
				return
			}
		}
	}
}
