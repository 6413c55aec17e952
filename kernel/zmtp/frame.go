package zmtp

import (
	"bufio"
	"bytes"
	"encoding/binary"
	"errors"
	"fmt"
	"io"
)

// Limits bound what one message of a peer may hold.
type Limits struct {
	Frames  int   // of one message
	Message int64 // bytes of all its frames together
}

// DefaultLimits leave room for the largest cell and for buffers.
var DefaultLimits = Limits{Frames: 256, Message: 64 << 20}

// errMalformed is the root of all complaints about a peer's bytes.
var errMalformed = errors.New("zmtp: malformed input")

func malformed(format string, args ...any) error {
	return fmt.Errorf("%w: %s", errMalformed, fmt.Sprintf(format, args...))
}

const (
	flagMore    = 1 << 0
	flagLong    = 1 << 1
	flagCommand = 1 << 2
)

// readFrame reads one frame of at most room bytes.
func readFrame(r *bufio.Reader, room int64) (flags byte, body []byte, err error) {
	if flags, err = r.ReadByte(); err != nil {
		return 0, nil, err
	}
	if flags&^(flagMore|flagLong|flagCommand) != 0 || flags&flagCommand != 0 && flags&flagMore != 0 {
		return 0, nil, malformed("frame flags %#02x", flags)
	}
	var head [8]byte
	width := 1
	if flags&flagLong != 0 {
		width = 8
	}
	if _, err = io.ReadFull(r, head[8-width:]); err != nil {
		return 0, nil, short(err)
	}
	size := binary.BigEndian.Uint64(head[:])
	if size > uint64(room) {
		return 0, nil, malformed("a frame of %d bytes where %d are allowed", size, room)
	}
	body, err = readBody(r, int64(size))
	return flags, body, err
}

// trusted is the length up to which memory is taken on a peer's word alone.
const trusted = 1 << 16

// readBody reads size bytes. Memory for a long frame grows with what arrives,
// so that a length alone costs nothing.
func readBody(r io.Reader, size int64) ([]byte, error) {
	if size <= trusted {
		body := make([]byte, size)
		_, err := io.ReadFull(r, body)
		return body, short(err)
	}
	var b bytes.Buffer
	_, err := io.CopyN(&b, r, size)
	return b.Bytes(), short(err)
}

// short is err, or that the input ended inside a frame.
func short(err error) error {
	if err == io.EOF {
		return io.ErrUnexpectedEOF
	}
	return err
}

func appendFrame(dst []byte, flags byte, body []byte) []byte {
	if len(body) > 255 {
		dst = append(dst, flags|flagLong)
		dst = binary.BigEndian.AppendUint64(dst, uint64(len(body)))
	} else {
		dst = append(dst, flags, byte(len(body)))
	}
	return append(dst, body...)
}

// AppendMessage appends a message of one or more frames, as it goes over the
// wire, to dst.
func AppendMessage(dst []byte, frames ...[]byte) []byte {
	for i, f := range frames {
		flags := byte(flagMore)
		if i == len(frames)-1 {
			flags = 0
		}
		dst = appendFrame(dst, flags, f)
	}
	return dst
}

// AppendCommand appends a command, whose name has at most 255 bytes, to dst.
func AppendCommand(dst []byte, name string, body []byte) []byte {
	b := make([]byte, 0, 1+len(name)+len(body))
	b = append(b, byte(len(name)))
	b = append(b, name...)
	return appendFrame(dst, flagCommand, append(b, body...))
}

// parseCommand splits the body of a command frame.
func parseCommand(b []byte) (name string, body []byte, err error) {
	if len(b) == 0 || int(b[0]) == 0 || int(b[0]) > len(b)-1 {
		return "", nil, malformed("command name")
	}
	n := int(b[0])
	return string(b[1 : 1+n]), b[1+n:], nil
}
