package transport

import (
	"net"
	"sync"
)

// Memory is a listener inside the process: Dial connects to it through a pipe.
// The same bytes flow as over any other network.
type Memory struct {
	conns chan net.Conn
	done  chan struct{}
	once  sync.Once
}

// NewMemory returns a listener that nobody has dialled yet.
func NewMemory() *Memory {
	return &Memory{conns: make(chan net.Conn), done: make(chan struct{})}
}

// Dial connects to the listener.
func (m *Memory) Dial() (net.Conn, error) {
	ours, theirs := net.Pipe()
	select {
	case m.conns <- theirs:
		return ours, nil
	case <-m.done:
		return nil, net.ErrClosed
	}
}

// Accept implements net.Listener.
func (m *Memory) Accept() (net.Conn, error) {
	select {
	case c := <-m.conns:
		return c, nil
	case <-m.done:
		return nil, net.ErrClosed
	}
}

// Close implements net.Listener.
func (m *Memory) Close() error {
	m.once.Do(func() { close(m.done) })
	return nil
}

// Addr implements net.Listener.
func (m *Memory) Addr() net.Addr { return memoryAddr{} }

type memoryAddr struct{}

func (memoryAddr) Network() string { return "memory" }
func (memoryAddr) String() string  { return "memory" }
