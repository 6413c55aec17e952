package kernel

import (
	"encoding/json"
	"errors"
	"fmt"
	"os"
	"strconv"
	"time"

	"adjoin/kernel/transport"
	"adjoin/kernel/wire"
	"adjoin/kernel/zmtp"
)

// Registration is the content of a registration file: the newer way to start a
// kernel, in which it chooses its ports itself and then tells them. No port can
// be taken by somebody else in between.
//
// Reference: Jupyter Enhancement Proposal 66, "Jupyter kernel handshaking
// pattern".
type Registration struct {
	KernelID  string `json:"kernel_id"`
	Transport string `json:"transport"`
	IP        string `json:"registration_ip"`
	Port      int    `json:"registration_port"`
	Scheme    string `json:"signature_scheme"`
	Key       string `json:"key"`
}

// ReadRegistration reads the file at path as a registration file; ok is false
// when it is a connection file.
func ReadRegistration(path string) (r Registration, ok bool, err error) {
	b, err := os.ReadFile(path)
	if err != nil {
		return r, false, err
	}
	if err := json.Unmarshal(b, &r); err != nil {
		return r, false, fmt.Errorf("%s is neither a connection file nor a registration file: %w", path, err)
	}
	return r, r.Port != 0, nil
}

// registrationTime is how long the other end may take to acknowledge.
const registrationTime = 10 * time.Second

// announcement is what the kernel tells about itself.
type announcement struct {
	KernelID  string `json:"kernel_id"`
	Shell     string `json:"shell_port"`
	Control   string `json:"control_port"`
	Stdin     string `json:"stdin_port"`
	IOPub     string `json:"iopub_port"`
	Heartbeat string `json:"hb_port"`
}

// Register opens five channels, tells their ports to whoever waits for them,
// and returns when that has been acknowledged.
func (r Registration) Register() (Listeners, Connection, error) {
	c := Connection{Transport: r.Transport, IP: r.IP, Key: r.Key, Scheme: r.Scheme}
	l, err := c.Listen()
	if err != nil {
		return l, c, err
	}
	if err := r.announce(c); err != nil {
		for _, open := range []interface{ Close() error }{l.Shell, l.Control, l.Stdin, l.IOPub, l.Heartbeat} {
			open.Close()
		}
		return Listeners{}, c, fmt.Errorf("cannot register: %w", err)
	}
	return l, c, nil
}

func (r Registration) announce(c Connection) error {
	codec, err := wire.NewCodec(r.Scheme, []byte(r.Key))
	if err != nil {
		return err
	}
	content, err := wire.Marshal(announcement{
		r.KernelID, strconv.Itoa(c.Shell), strconv.Itoa(c.Control), strconv.Itoa(c.Stdin), strconv.Itoa(c.IOPub), strconv.Itoa(c.Heartbeat),
	})
	if err != nil {
		return err
	}
	raw, err := transport.Dial(transport.Address{Transport: r.Transport, IP: r.IP, Port: r.Port}, registrationTime)
	if err != nil {
		return err
	}
	defer raw.Close()
	if err := raw.SetDeadline(time.Now().Add(registrationTime)); err != nil {
		return err
	}
	in, err := zmtp.Handshake(raw, zmtp.Dealer, nil, zmtp.DefaultLimits)
	if err != nil {
		return err
	}
	if _, err := raw.Write(zmtp.AppendMessage(nil, []byte("<IDS|MSG>"), codec.Sign(content), content)); err != nil {
		return err
	}
	for {
		p, err := in.Read()
		if err != nil {
			return err
		}
		if p.Command == "" {
			return acknowledged(codec, p.Frames)
		}
	}
}

// acknowledged checks the answer: signed, and the signature right.
func acknowledged(codec *wire.Codec, frames [][]byte) error {
	for i, f := range frames {
		if string(f) == "<IDS|MSG>" && len(frames) >= i+3 {
			if string(frames[i+1]) == string(codec.Sign(frames[i+2:]...)) {
				return nil
			}
		}
	}
	return errors.New("the acknowledgement is not signed as it should be")
}
