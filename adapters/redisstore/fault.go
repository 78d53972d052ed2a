package redisstore

import (
	"context"
	"errors"
	"fmt"
	"net"
	"regexp"
	"strings"

	"github.com/redis/go-redis/v9"

	"galeward/bot/store"
)

// The faults of a store on a server; Do returns them wrapped.
var (
	// ErrRefused says that the server did not take the user, the password or
	// what the user asked for.
	ErrRefused = errors.New("redisstore: the server refused the user, the password or the command")
	// ErrReadOnly says that the server is a replica, as it is for a moment
	// while another server takes over.
	ErrReadOnly = errors.New("redisstore: the server is a replica and takes no writes")
	// ErrNoAnswer says that the server could not be reached or did not answer
	// in time.
	ErrNoAnswer = errors.New("redisstore: no answer from the server")

	errSecret  = errors.New("redisstore: a password can't be read")
	errForeign = errors.New("redisstore: a key holds what another program wrote")
	errReply   = errors.New("redisstore: the server gave a reply that the script does not give")
)

// named are the server's words for what has a name here.
var named = map[string]error{
	"OOM": store.ErrFull, "MISCONF": store.ErrFull,
	"NOAUTH": ErrRefused, "WRONGPASS": ErrRefused, "NOPERM": ErrRefused,
	"READONLY": ErrReadOnly,
	"FOREIGN":  errForeign, "WRONGTYPE": errForeign,
}

// fault is the error that a caller sees. Of what a server says only the code
// is shown: its sentences may repeat what it was given.
func fault(ctx context.Context, err error) error {
	if code := serverCode(err); code != "" {
		if known, ok := named[code]; ok {
			return fmt.Errorf("%w (%s)", known, code)
		}
		return fmt.Errorf("redisstore: the server answered %s", code)
	}
	switch {
	case errors.Is(err, errForeign), errors.Is(err, errReply), errors.Is(err, errSecret):
		return err
	case ctx.Err() != nil && !errors.Is(err, ctx.Err()):
		return fmt.Errorf("%w: %w: %w", ErrNoAnswer, ctx.Err(), err)
	}
	return fmt.Errorf("%w: %w", ErrNoAnswer, err)
}

// codeInside is where old servers put the code of an error within a script.
var codeInside = regexp.MustCompile(`-([A-Z]{3,}) `)

// serverCode is the code of an error that the server answered, and "" when the
// error is not an answer.
func serverCode(err error) string {
	var answer redis.Error
	if err == nil || !errors.As(err, &answer) {
		return ""
	}
	code, rest, _ := strings.Cut(answer.Error(), " ")
	if code == "ERR" && strings.HasPrefix(rest, "Error running script") {
		if inside := codeInside.FindStringSubmatch(rest); inside != nil {
			return inside[1]
		}
	}
	if code == "" || code != strings.ToUpper(code) {
		return "ERR"
	}
	return code
}

// lost says whether the call may have been carried out although it failed, or
// was never sent because a machine in a rush was slow to connect: the server
// gave no answer. A server that refuses a connection is down, and nothing lost.
func lost(err error) bool {
	if err == nil || serverCode(err) != "" || ours(err) {
		return false
	}
	var dial *net.OpError
	return !(errors.As(err, &dial) && dial.Op == "dial" && !dial.Timeout())
}

// ours are errors before a connection was had, or after a reply was.
func ours(err error) bool {
	return errors.Is(err, context.Canceled) || errors.Is(err, context.DeadlineExceeded) ||
		errors.Is(err, redis.ErrPoolTimeout) || errors.Is(err, redis.ErrPoolExhausted) || errors.Is(err, redis.ErrClosed) ||
		errors.Is(err, errForeign) || errors.Is(err, errReply) || errors.Is(err, errSecret)
}

// turnedAway says whether a server did nothing because it is handing over: to
// another that takes its place (a new connection may lead there), or a part of
// a cluster's keys to another node, between which a call can't be split.
func turnedAway(err error) bool {
	code := serverCode(err)
	return code == "READONLY" || code == "TRYAGAIN"
}

// moved says whether a node of a cluster sent the call elsewhere.
func moved(err error) bool {
	code := serverCode(err)
	return code == "MOVED" || code == "ASK"
}
