package transport

import (
	"bytes"
	"context"
	"net"
	"sync"
	"time"

	"adjoin/kernel/zmtp"
)

// Publisher is a socket that sends broadcasts to the peers that subscribed to
// their topic, which is the beginning of the first frame.
type Publisher struct {
	acceptor
	welcome func(topic []byte) [][]byte

	// order makes all peers get all broadcasts in one order. It guards topics.
	order  sync.Mutex
	topics map[*peer]map[string]int
}

// NewPublisher serves the subscribers that come to l. Welcome makes what a
// subscriber gets for a new subscription, before anything else that the
// subscription brings; nil frames are not sent.
func NewPublisher(l net.Listener, o Options, welcome func(topic []byte) [][]byte) *Publisher {
	p := &Publisher{welcome: welcome, topics: map[*peer]map[string]int{}}
	p.acceptor = acceptor{listener: l, own: zmtp.XPub, o: o.filled(), serve: p.serve}
	p.start()
	return p
}

// Publish sends frames to every subscriber of their topic, without waiting for
// any.
func (p *Publisher) Publish(frames [][]byte) {
	var encoded []byte
	p.order.Lock()
	defer p.order.Unlock()
	for s, topics := range p.topics {
		if !subscribed(topics, frames[0]) {
			continue
		}
		if encoded == nil {
			encoded = zmtp.AppendMessage(nil, frames...)
		}
		if !s.out.put(encoded) {
			delete(p.topics, s)
		}
	}
}

func subscribed(topics map[string]int, topic []byte) bool {
	for t := range topics {
		if bytes.HasPrefix(topic, []byte(t)) {
			return true
		}
	}
	return false
}

// Wait holds up its caller, a source of many broadcasts, while subscribers have
// much to read. It does not wait for one that has taken nothing for a while, so
// that the others get on; that one is disconnected when too much waits for it,
// or when it still takes nothing.
func (p *Publisher) Wait(ctx context.Context) {
	for p.behind() && ctx.Err() == nil {
		time.Sleep(2 * time.Millisecond)
	}
}

// behind says whether a subscriber that is worth waiting for has much to read.
func (p *Publisher) behind() bool {
	p.order.Lock()
	defer p.order.Unlock()
	for s := range p.topics {
		if size, still := s.out.load(); size > p.o.Room && still < p.o.Patience {
			return true
		}
	}
	return false
}

func (p *Publisher) serve(s *peer) {
	defer func() {
		p.order.Lock()
		delete(p.topics, s)
		p.order.Unlock()
	}()
	for {
		k, err := s.read()
		if err != nil {
			return
		}
		topic, on, ok := k.Subscription()
		switch {
		case !ok:
		case on:
			p.subscribe(s, topic)
		default:
			p.cancel(s, topic)
		}
	}
}

// most subscriptions of one peer; more are not heard.
const maxTopics = 1024

func (p *Publisher) subscribe(s *peer, topic []byte) {
	hello := p.welcome(topic)
	p.order.Lock()
	defer p.order.Unlock()
	if p.topics[s] == nil {
		p.topics[s] = map[string]int{}
	}
	if len(p.topics[s]) >= maxTopics {
		return
	}
	p.topics[s][string(topic)]++
	if hello != nil {
		s.out.put(zmtp.AppendMessage(nil, hello...))
	}
}

func (p *Publisher) cancel(s *peer, topic []byte) {
	p.order.Lock()
	defer p.order.Unlock()
	t := p.topics[s]
	if t == nil {
		return
	}
	if t[string(topic)]--; t[string(topic)] <= 0 {
		delete(t, string(topic))
	}
}
