package kernel

import (
	"encoding/json"
	"fmt"
	"net"
	"os"
	"path/filepath"
	"time"

	"adjoin/kernel/transport"
)

// Connection is the content of a connection file: where the five channels of a
// kernel are, and the key that its messages are signed with.
type Connection struct {
	Transport  string `json:"transport"`
	IP         string `json:"ip"`
	Shell      int    `json:"shell_port"`
	Control    int    `json:"control_port"`
	Stdin      int    `json:"stdin_port"`
	IOPub      int    `json:"iopub_port"`
	Heartbeat  int    `json:"hb_port"`
	Key        string `json:"key"`
	Scheme     string `json:"signature_scheme"`
	KernelName string `json:"kernel_name,omitempty"`
}

// ReadConnection reads a connection file.
func ReadConnection(path string) (Connection, error) {
	var c Connection
	b, err := os.ReadFile(path)
	if err != nil {
		return c, err
	}
	if err := json.Unmarshal(b, &c); err != nil {
		return c, fmt.Errorf("%s is not a connection file: %w", path, err)
	}
	if c.IP == "" {
		return c, fmt.Errorf("%s is not a connection file: it names no address", path)
	}
	return c, nil
}

// Write writes a connection file that only this user can read.
func (c Connection) Write(path string) error {
	b, err := json.MarshalIndent(c, "", "  ")
	if err != nil {
		return err
	}
	f, err := os.CreateTemp(filepath.Dir(path), ".connection-*")
	if err != nil {
		return err
	}
	defer os.Remove(f.Name())
	if _, err := f.Write(b); err != nil {
		f.Close()
		return err
	}
	if err := f.Close(); err != nil {
		return err
	}
	return os.Rename(f.Name(), path)
}

// ports are the channels' ports, in a fixed order.
func (c *Connection) ports() [5]*int {
	return [5]*int{&c.Shell, &c.Control, &c.Stdin, &c.IOPub, &c.Heartbeat}
}

// Listen opens the five channels. Where c says port 0, any free one is taken
// and written to c.
func (c *Connection) Listen() (Listeners, error) {
	var l Listeners
	opened := [5]*net.Listener{&l.Shell, &l.Control, &l.Stdin, &l.IOPub, &l.Heartbeat}
	for i, port := range c.ports() {
		if c.Transport == "ipc" && *port == 0 {
			*port = i + 1
		}
		listener, err := transport.Listen(transport.Address{Transport: c.Transport, IP: c.IP, Port: *port})
		if err != nil {
			for _, o := range opened[:i] {
				(*o).Close()
			}
			return Listeners{}, err
		}
		*opened[i] = listener
		if a, ok := listener.Addr().(*net.TCPAddr); ok {
			*port = a.Port
		}
	}
	return l, nil
}

// Dial connects to the channel at a port of c.
func (c Connection) Dial(port int) (net.Conn, error) {
	return transport.Dial(transport.Address{Transport: c.Transport, IP: c.IP, Port: port}, 5*time.Second)
}
