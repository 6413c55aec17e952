package transport

import (
	"net"
	"runtime/debug"
	"sync"
	"time"

	"adjoin/kernel/zmtp"
)

// peer is a connection after its handshake.
type peer struct {
	*zmtp.Conn
	out *outbox
}

// acceptor lets peers in and keeps count of them.
type acceptor struct {
	listener net.Listener
	own      zmtp.SocketType
	o        Options
	// serve reads what one peer sends, until an error.
	serve func(*peer)

	mu     sync.Mutex
	conns  map[net.Conn]struct{}
	peers  map[*peer]struct{}
	closed bool
}

func (a *acceptor) start() {
	a.conns = map[net.Conn]struct{}{}
	a.peers = map[*peer]struct{}{}
	go a.accept()
}

func (a *acceptor) accept() {
	for {
		c, err := a.listener.Accept()
		if err != nil {
			if a.isClosed() {
				return
			}
			// Out of file descriptors, most likely: others may let go of some.
			a.o.logf("cannot accept a connection: %v", err)
			time.Sleep(50 * time.Millisecond)
			continue
		}
		if !a.admit(c) {
			c.Close()
			continue
		}
		go a.attend(c)
	}
}

func (a *acceptor) isClosed() bool {
	a.mu.Lock()
	defer a.mu.Unlock()
	return a.closed
}

func (a *acceptor) admit(c net.Conn) bool {
	a.mu.Lock()
	defer a.mu.Unlock()
	if a.closed || len(a.conns) >= a.o.Peers {
		return false
	}
	a.conns[c] = struct{}{}
	return true
}

// attend is the life of one connection. Whatever goes wrong with it stays
// here.
func (a *acceptor) attend(c net.Conn) {
	defer func() {
		c.Close()
		a.mu.Lock()
		delete(a.conns, c)
		a.mu.Unlock()
		if r := recover(); r != nil {
			a.o.logf("a connection ends by a defect: %v\n%s", r, debug.Stack())
		}
	}()
	_ = c.SetDeadline(time.Now().Add(a.o.Handshake))
	z, err := zmtp.Handshake(c, a.own, nil, a.o.Limits)
	if err != nil {
		a.o.logf("a connection is refused: %v", err)
		return
	}
	if c.SetDeadline(time.Time{}) != nil {
		return
	}
	p := &peer{Conn: z, out: newOutbox(c, a.o.Stall, a.o.Most)}
	a.mu.Lock()
	closed := a.closed
	a.peers[p] = struct{}{}
	a.mu.Unlock()
	defer func() {
		p.out.close()
		a.mu.Lock()
		delete(a.peers, p)
		a.mu.Unlock()
	}()
	if closed {
		return
	}
	go p.out.write()
	a.serve(p)
}

// read is the peer's next message or subscription; commands that concern the
// connection alone are dealt with here.
func (p *peer) read() (zmtp.Packet, error) {
	for {
		k, err := p.Conn.Read()
		if err != nil {
			return k, err
		}
		if pong := k.Pong(); pong != nil {
			p.out.put(pong)
			continue
		}
		return k, nil
	}
}

// Close stops listening, waits at most drain until what has been sent is
// written, and disconnects all peers.
func (a *acceptor) Close(drain time.Duration) {
	a.mu.Lock()
	a.closed = true
	a.mu.Unlock()
	a.listener.Close()
	for end := time.Now().Add(drain); time.Now().Before(end) && a.pending(); {
		time.Sleep(time.Millisecond)
	}
	a.mu.Lock()
	defer a.mu.Unlock()
	for c := range a.conns {
		c.Close()
	}
	for p := range a.peers {
		p.out.close()
	}
}

func (a *acceptor) pending() bool {
	a.mu.Lock()
	defer a.mu.Unlock()
	for p := range a.peers {
		if size, _ := p.out.load(); size > 0 {
			return true
		}
	}
	return false
}
