package client

import (
	"context"
	"crypto/rand"
	"encoding/hex"
	"encoding/json"
	"errors"
	"fmt"
	"net"
	"sync"
	"sync/atomic"
	"time"

	"adjoin/kernel/wire"
	"adjoin/kernel/zmtp"
)

// Dialer connects to the channels of one kernel.
type Dialer struct {
	Shell, Control, IOPub, Heartbeat func() (net.Conn, error)
}

// Client is a client of one kernel. Its methods may be called concurrently.
type Client struct {
	codec          *wire.Codec
	session        string
	serial         atomic.Uint64
	shell, control *channel
	iopub          *channel
	dial           Dialer

	mu      sync.Mutex
	waiting map[string]*inbox // by the id of the request
	reading int               // channels that are open
	cause   error             // why the first of them ended
	ended   error             // why no more messages come: set when all have ended
	welcome chan struct{}
	tap     func(*wire.Message)
}

// channel is one connection.
type channel struct {
	raw net.Conn
	in  *zmtp.Conn
	mu  sync.Mutex // of writing
}

// inbox is what has come for one request. It never makes the reader wait.
type inbox struct {
	mu       sync.Mutex
	messages []Arrival
	more     chan struct{}
}

// Arrival is a message about a request: its reply, or a broadcast.
type Arrival struct {
	*wire.Message
	Broadcast bool
}

// Options are what a client is made of.
type Options struct {
	Scheme string
	Key    []byte
	// Tap, when not nil, sees all broadcasts, in order.
	Tap func(*wire.Message)
}

// Connect connects to a kernel and waits until its broadcasts come through,
// which a kernel of protocol 5.5 says with a welcome.
func Connect(ctx context.Context, d Dialer, o Options) (*Client, error) {
	codec, err := wire.NewCodec(o.Scheme, o.Key)
	if err != nil {
		return nil, err
	}
	c := &Client{
		codec:   codec,
		session: newID(),
		dial:    d,
		waiting: map[string]*inbox{},
		welcome: make(chan struct{}),
		tap:     o.Tap,
		reading: 3,
	}
	if c.shell, err = open(d.Shell, zmtp.Dealer); err != nil {
		return nil, err
	}
	if c.control, err = open(d.Control, zmtp.Dealer); err != nil {
		c.Close()
		return nil, err
	}
	if c.iopub, err = open(d.IOPub, zmtp.Sub); err != nil {
		c.Close()
		return nil, err
	}
	go c.read(c.shell, false)
	go c.read(c.control, false)
	go c.read(c.iopub, true)
	if err := c.iopub.write([]byte{1}); err != nil {
		c.Close()
		return nil, err
	}
	select {
	case <-c.welcome:
		return c, nil
	case <-ctx.Done():
		c.Close()
		return nil, fmt.Errorf("the kernel does not welcome its subscriber: %w", context.Cause(ctx))
	}
}

func newID() string {
	var b [16]byte
	_, _ = rand.Read(b[:]) // never fails
	return hex.EncodeToString(b[:])
}

func open(dial func() (net.Conn, error), own zmtp.SocketType) (*channel, error) {
	raw, err := dial()
	if err != nil {
		return nil, err
	}
	_ = raw.SetDeadline(time.Now().Add(5 * time.Second))
	in, err := zmtp.Handshake(raw, own, nil, zmtp.DefaultLimits)
	if err != nil {
		raw.Close()
		return nil, err
	}
	_ = raw.SetDeadline(time.Time{})
	return &channel{raw: raw, in: in}, nil
}

func (h *channel) write(frames ...[]byte) error {
	h.mu.Lock()
	defer h.mu.Unlock()
	_, err := h.raw.Write(zmtp.AppendMessage(nil, frames...))
	return err
}

// Close disconnects.
func (c *Client) Close() {
	for _, h := range []*channel{c.shell, c.control, c.iopub} {
		if h != nil {
			h.raw.Close()
		}
	}
}

// read hands what comes in to those that wait for it.
func (c *Client) read(h *channel, broadcast bool) {
	for {
		p, err := h.in.Read()
		if err != nil {
			c.end(err)
			return
		}
		if p.Command != "" {
			continue
		}
		m, err := c.codec.Decode(p.Frames)
		if err != nil {
			c.end(err)
			return
		}
		c.deliver(Arrival{m, broadcast})
	}
}

func (c *Client) deliver(a Arrival) {
	if a.Broadcast && c.tap != nil {
		c.tap(a.Message)
	}
	if a.Header.Type == "iopub_welcome" {
		select {
		case <-c.welcome:
		default:
			close(c.welcome)
		}
		return
	}
	c.mu.Lock()
	box := c.waiting[a.ParentHeader().ID]
	c.mu.Unlock()
	if box != nil {
		box.put(a)
	}
}

func (b *inbox) put(a Arrival) {
	b.mu.Lock()
	b.messages = append(b.messages, a)
	b.mu.Unlock()
	select {
	case b.more <- struct{}{}:
	default:
	}
}

func (b *inbox) take() []Arrival {
	b.mu.Lock()
	defer b.mu.Unlock()
	m := b.messages
	b.messages = nil
	return m
}

// linger is how long the other channels are read when one has ended: what the
// kernel said before it ended may still be on its way.
const linger = 200 * time.Millisecond

// end notes that a channel has ended, and when it was the last wakes those that
// wait: nothing more comes.
func (c *Client) end(err error) {
	c.mu.Lock()
	defer c.mu.Unlock()
	if c.cause == nil {
		c.cause = err
		time.AfterFunc(linger, c.Close)
	}
	if c.reading--; c.reading > 0 {
		return
	}
	c.ended = fmt.Errorf("the connection to the kernel has ended: %w", c.cause)
	for _, b := range c.waiting {
		select {
		case b.more <- struct{}{}:
		default:
		}
	}
}

// Pending is a request that has been sent.
type Pending struct {
	ID  string
	c   *Client
	box *inbox
}

// Send sends a request of a type and content on shell, or on control.
func (c *Client) Send(control bool, kind string, content any) (*Pending, error) {
	b, err := wire.Marshal(content)
	if err != nil {
		return nil, err
	}
	m := &wire.Message{
		Header: wire.Header{
			ID:       fmt.Sprintf("%s_%d", c.session, c.serial.Add(1)),
			Session:  c.session,
			Username: "client",
			Date:     time.Now().UTC().Format("2006-01-02T15:04:05.000000Z"),
			Type:     kind,
			Version:  wire.Protocol,
		},
		Content: b,
	}
	frames, err := c.codec.Encode(m)
	if err != nil {
		return nil, err
	}
	p := &Pending{ID: m.Header.ID, c: c, box: &inbox{more: make(chan struct{}, 1)}}
	c.mu.Lock()
	c.waiting[p.ID] = p.box
	c.mu.Unlock()
	h := c.shell
	if control {
		h = c.control
	}
	if err := h.write(frames...); err != nil {
		p.Forget()
		return nil, err
	}
	return p, nil
}

// Forget drops whatever else comes for the request.
func (p *Pending) Forget() {
	p.c.mu.Lock()
	defer p.c.mu.Unlock()
	delete(p.c.waiting, p.ID)
}

// Wait hands what comes for the request to see, which may be nil, and returns
// its reply, when both the reply and idle are there.
func (p *Pending) Wait(ctx context.Context, see func(Arrival)) (*wire.Message, error) {
	defer p.Forget()
	var reply *wire.Message
	idle := false
	for {
		p.c.mu.Lock()
		ended := p.c.ended // before what has come is looked at
		p.c.mu.Unlock()
		for _, a := range p.box.take() {
			if see != nil {
				see(a)
			}
			if !a.Broadcast {
				reply = a.Message
			} else if isIdle(a.Message) {
				idle = true
			}
		}
		switch {
		case reply != nil && idle:
			return reply, nil
		case ended != nil:
			return nil, ended
		}
		select {
		case <-p.box.more:
		case <-ctx.Done():
			return nil, context.Cause(ctx)
		}
	}
}

func isIdle(m *wire.Message) bool {
	var s wire.KernelStatus
	return m.Header.Type == "status" && json.Unmarshal(m.Content, &s) == nil && s.State == wire.Idle
}

// Ask sends a request on shell, or on control, and reads its reply into
// answer.
func (c *Client) Ask(ctx context.Context, control bool, kind string, content, answer any) error {
	p, err := c.Send(control, kind, content)
	if err != nil {
		return err
	}
	reply, err := p.Wait(ctx, nil)
	if err != nil {
		return err
	}
	return json.Unmarshal(reply.Content, answer)
}

// Beat sends a heartbeat and waits for its echo.
func (c *Client) Beat(ctx context.Context) error {
	h, err := open(c.dial.Heartbeat, zmtp.Req)
	if err != nil {
		return err
	}
	defer h.raw.Close()
	if until, ok := ctx.Deadline(); ok {
		_ = h.raw.SetDeadline(until)
	}
	if err := h.write(nil, []byte("ping")); err != nil {
		return err
	}
	p, err := h.in.Read()
	if err != nil {
		return err
	}
	if len(p.Frames) != 2 || string(p.Frames[1]) != "ping" {
		return errors.New("the heartbeat comes back changed")
	}
	return nil
}
