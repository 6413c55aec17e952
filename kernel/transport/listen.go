package transport

import (
	"errors"
	"fmt"
	"io/fs"
	"net"
	"os"
	"strconv"
	"syscall"
	"time"
)

// Address is where a channel is, in the terms of a connection file. For the
// transport "tcp" it is an IP address and a port, 0 meaning any free one; for
// "ipc" the beginning of a path and a number that is appended to it.
type Address struct {
	Transport string
	IP        string
	Port      int
}

func (a Address) network() (network, address string, err error) {
	switch a.Transport {
	case "tcp", "":
		return "tcp", net.JoinHostPort(a.IP, strconv.Itoa(a.Port)), nil
	case "ipc":
		return "unix", a.IP + "-" + strconv.Itoa(a.Port), nil
	}
	return "", "", fmt.Errorf("transport %q is not known; use tcp or ipc", a.Transport)
}

// Listen opens the address. A socket file that a killed kernel has left behind
// is replaced.
func Listen(a Address) (net.Listener, error) {
	network, address, err := a.network()
	if err != nil {
		return nil, err
	}
	l, err := net.Listen(network, address)
	if network == "unix" && errors.Is(err, syscall.EADDRINUSE) && abandoned(address) {
		if err := os.Remove(address); err != nil {
			return nil, err
		}
		l, err = net.Listen(network, address)
	}
	return l, err
}

// abandoned says whether path is a socket that nobody listens on.
func abandoned(path string) bool {
	info, err := os.Lstat(path)
	if err != nil || info.Mode()&fs.ModeSocket == 0 {
		return false
	}
	c, err := net.DialTimeout("unix", path, time.Second)
	if err == nil {
		c.Close()
	}
	return err != nil
}

// Dial connects to the address.
func Dial(a Address, timeout time.Duration) (net.Conn, error) {
	network, address, err := a.network()
	if err != nil {
		return nil, err
	}
	return net.DialTimeout(network, address, timeout)
}
