package transport

import (
	"bufio"
	"net"
	"sync"
	"time"
)

// outbox is what waits to be written to one connection. Put never blocks;
// write, on a goroutine of its own, does the writing.
type outbox struct {
	conn  net.Conn
	stall time.Duration
	most  int64

	mu      sync.Mutex
	wake    sync.Cond
	waiting [][]byte
	size    int64     // bytes put and not yet written
	moved   time.Time // when the peer last took something, or had nothing to take
	closed  bool
}

func newOutbox(conn net.Conn, stall time.Duration, most int64) *outbox {
	b := &outbox{conn: conn, stall: stall, most: most, moved: time.Now()}
	b.wake.L = &b.mu
	return b
}

// put adds bytes, which must not change afterwards. When too much waits
// already the connection is closed.
func (b *outbox) put(p []byte) bool {
	b.mu.Lock()
	defer b.mu.Unlock()
	if b.closed {
		return false
	}
	// One message alone is let through whatever its size.
	if b.size > 0 && b.size+int64(len(p)) > b.most {
		b.shut()
		return false
	}
	if b.size == 0 {
		b.moved = time.Now()
	}
	b.waiting = append(b.waiting, p)
	b.size += int64(len(p))
	b.wake.Signal()
	return true
}

// load is how many bytes wait, and for how long the peer has taken none.
func (b *outbox) load() (size int64, still time.Duration) {
	b.mu.Lock()
	defer b.mu.Unlock()
	if b.closed || b.size == 0 {
		return 0, 0
	}
	return b.size, time.Since(b.moved)
}

// write writes what is put until the outbox is closed or the peer gone.
func (b *outbox) write() {
	w := bufio.NewWriterSize((*paced)(b), 1<<16)
	for {
		batch := b.take()
		if batch == nil {
			return
		}
		var n int64
		for _, p := range batch {
			n += int64(len(p))
			if _, err := w.Write(p); err != nil {
				b.close()
				return
			}
		}
		if err := w.Flush(); err != nil {
			b.close()
			return
		}
		b.mu.Lock()
		b.size -= n
		b.mu.Unlock()
	}
}

// take waits for something to write; nil when the outbox is closed.
func (b *outbox) take() [][]byte {
	b.mu.Lock()
	defer b.mu.Unlock()
	for len(b.waiting) == 0 && !b.closed {
		b.wake.Wait()
	}
	batch := b.waiting
	b.waiting = nil
	if b.closed {
		return nil
	}
	return batch
}

func (b *outbox) close() {
	b.mu.Lock()
	defer b.mu.Unlock()
	b.shut()
}

func (b *outbox) shut() {
	if !b.closed {
		b.closed = true
		b.waiting, b.size = nil, 0
		b.conn.Close()
		b.wake.Broadcast()
	}
}

// paced writes to the connection piece by piece, so that a slow peer is told
// from one that has stopped.
type paced outbox

const piece = 1 << 18

func (b *paced) Write(p []byte) (n int, err error) {
	for len(p) > 0 {
		q := p[:min(len(p), piece)]
		if err := b.conn.SetWriteDeadline(time.Now().Add(b.stall)); err != nil {
			return n, err
		}
		k, err := b.conn.Write(q)
		n += k
		if err != nil {
			return n, err
		}
		b.mu.Lock()
		b.moved = time.Now()
		b.mu.Unlock()
		p = p[k:]
	}
	return n, nil
}
