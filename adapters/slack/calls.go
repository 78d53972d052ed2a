package slack

import (
	"context"
	"errors"
	"fmt"
	"net/http"
	"strconv"
	"strings"

	"galeward/adapters/transport"

	slackapi "github.com/slack-go/slack"
)

// judge says which failures may be tried again: being told to wait, and those
// of the network and of Slack's own servers. What Slack refused it refuses again.
func judge(err error) transport.Verdict {
	var limited *slackapi.RateLimitedError
	var status slackapi.StatusCodeError
	var odd *strconv.NumError // a Retry-After that is no whole number
	switch {
	case errors.As(err, &limited):
		return transport.Verdict{Again: true, After: limited.RetryAfter}
	case errors.As(err, &status):
		return transport.Verdict{Again: status.Code == http.StatusTooManyRequests || status.Code >= 500}
	case errors.As(err, &odd):
		return transport.Verdict{Again: true}
	case code(err) != "":
		return transport.Verdict{Again: code(err) == "ratelimited" || code(err) == "internal_error" || code(err) == "service_unavailable"}
	case errors.Is(err, errSpent), errors.Is(err, errUnsure), errors.As(err, new(final)), errors.Is(err, context.Canceled):
		return transport.Verdict{}
	}
	return transport.Verdict{Again: true}
}

// code is the error word of Slack's Web API, "" for any other error.
func code(err error) string {
	var refused slackapi.SlackErrorResponse
	if errors.As(err, &refused) {
		return refused.Err
	}
	return ""
}

// isCode says that err is one of Slack's error words.
func isCode(err error, words ...string) bool {
	c := code(err)
	for _, w := range words {
		if c == w {
			return true
		}
	}
	return false
}

// unsure says that a call may have done its work although it failed.
func unsure(err error) bool {
	var limited *slackapi.RateLimitedError
	var status slackapi.StatusCodeError
	var odd *strconv.NumError
	switch {
	case err == nil, errors.As(err, &limited), errors.As(err, &odd), transport.NotSent(err):
		return false
	case errors.As(err, &status):
		return status.Code >= 500
	case code(err) != "":
		return isCode(err, "internal_error", "fatal_error", "request_timeout", "service_unavailable")
	}
	return true
}

// callError is a failed call in words that hold no address, token or text.
type callError struct {
	what  string
	why   string
	cause error
}

func (e *callError) Error() string { return fmt.Sprintf("slack %s: %s", e.what, e.why) }

// Unwrap gives the cause, for errors.Is and errors.As.
func (e *callError) Unwrap() error { return e.cause }

func describe(what string, err error) error {
	if err == nil {
		return nil
	}
	return &callError{what, why(err), err}
}

func why(err error) string {
	var limited *slackapi.RateLimitedError
	var status slackapi.StatusCodeError
	var odd *strconv.NumError
	switch {
	case errors.As(err, &limited), errors.As(err, &odd):
		return "told to wait"
	case errors.As(err, &status):
		return "status " + strconv.Itoa(status.Code)
	case code(err) != "":
		return word(code(err))
	case errors.Is(err, errSpent), errors.Is(err, errUnsure):
		return err.Error()
	case errors.Is(err, transport.ErrBusy):
		return transport.ErrBusy.Error()
	}
	if safe := transport.SafeError(err); safe != err {
		return safe.Error()
	}
	if errors.Is(err, context.Canceled) || errors.Is(err, context.DeadlineExceeded) {
		return "out of time"
	}
	return "answer not understood"
}

// word lets only error words through: what stands in that place comes from
// outside.
func word(s string) string {
	if len(s) > 60 || strings.Trim(s, "abcdefghijklmnopqrstuvwxyz_") != "" {
		return "unknown refusal"
	}
	return s
}
