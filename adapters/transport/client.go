package transport

import (
	"context"
	"errors"
	"fmt"
	"net"
	"net/http"
	"net/url"
	"time"
)

// NewClient returns an HTTP client in which no step can take for ever: timeout
// bounds a whole call, body included. It follows no redirect, since that would
// carry a token or a secret address to a host nobody named. base replaces the
// network in tests; nil means the network.
func NewClient(timeout time.Duration, base http.RoundTripper) *http.Client {
	if base == nil {
		dialer := &net.Dialer{Timeout: timeout / 2, KeepAlive: 30 * time.Second}
		base = &http.Transport{
			Proxy:                 http.ProxyFromEnvironment,
			DialContext:           dialer.DialContext,
			TLSHandshakeTimeout:   timeout / 2,
			ResponseHeaderTimeout: timeout,
			MaxIdleConns:          64,
			MaxIdleConnsPerHost:   16,
			IdleConnTimeout:       60 * time.Second,
			ForceAttemptHTTP2:     true,
		}
	}
	return &http.Client{Timeout: timeout, Transport: base,
		CheckRedirect: func(*http.Request, []*http.Request) error { return http.ErrUseLastResponse }}
}

// RedactURL keeps the scheme and host of an address and hides the rest, which
// on chat platforms is a secret.
func RedactURL(raw string) string {
	u, err := url.Parse(raw)
	if err != nil || u.Host == "" {
		return "(address hidden)"
	}
	return u.Scheme + "://" + u.Host + "/..."
}

// SafeError describes a failed HTTP call without the address that *url.Error
// prints: only the host and what kind of failure it was. Errors of other kinds
// come back unchanged.
func SafeError(err error) error {
	var u *url.Error
	if !errors.As(err, &u) {
		return err
	}
	return &netError{host: RedactURL(u.URL), cause: u.Err, timeout: u.Timeout()}
}

type netError struct {
	host    string
	cause   error
	timeout bool
}

func (e *netError) Error() string {
	switch {
	case errors.Is(e.cause, context.Canceled):
		return fmt.Sprintf("call to %s: cancelled", e.host)
	case e.timeout:
		return fmt.Sprintf("call to %s: no answer in time", e.host)
	case NotSent(e.cause):
		return fmt.Sprintf("call to %s: no connection", e.host)
	}
	return fmt.Sprintf("call to %s: connection lost", e.host)
}

// Unwrap gives the cause, for errors.Is; its text may name an address.
func (e *netError) Unwrap() error { return e.cause }

// NotSent says that a call failed before anything reached the other side, so
// that repeating it can not do its work twice.
func NotSent(err error) bool {
	var op *net.OpError
	var dns *net.DNSError
	return errors.As(err, &dns) || errors.As(err, &op) && op.Op == "dial"
}
