package wire

// remembered is how many signatures a codec keeps. An attacker who can replay
// a message must do so within as many messages.
const remembered = 1 << 14

// replays remembers the latest signatures, each by its first 16 bytes: the
// signature has been found right before, so no peer without the key chooses
// them.
type replays struct {
	known map[[16]byte]struct{}
	ring  [][16]byte
	next  int
}

// add says whether signature is new, and remembers it.
func (r *replays) add(signature []byte) bool {
	var k [16]byte
	copy(k[:], signature)
	if _, old := r.known[k]; old {
		return false
	}
	if r.known == nil {
		r.known = map[[16]byte]struct{}{}
	}
	if len(r.ring) < remembered {
		r.ring = append(r.ring, k)
	} else {
		delete(r.known, r.ring[r.next])
		r.ring[r.next] = k
		r.next = (r.next + 1) % remembered
	}
	r.known[k] = struct{}{}
	return true
}
