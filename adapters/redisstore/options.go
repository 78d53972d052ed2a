package redisstore

import (
	"context"
	"crypto/tls"
	"errors"
	"fmt"
	"os"
	"strings"
	"time"

	"github.com/redis/go-redis/v9"
	"github.com/redis/go-redis/v9/maintnotifications"
)

// Options are the settings of a store. Addrs is needed; the rest may be left
// out.
type Options struct {
	// Addrs are host:port: the server, or the sentinels, or some nodes of the
	// cluster. The path of a Unix socket serves for a single server.
	Addrs []string
	// Master is the name that the sentinels know the server by; Addrs are then
	// the sentinels.
	Master string
	// Cluster says that Addrs are nodes of a cluster.
	Cluster bool
	// DB is the number of the database; a cluster has only 0.
	DB int

	// Username is the server's user; "" means its default user.
	Username string
	// Password of the user. Better: PasswordFile.
	Password string
	// PasswordFile is a file with the password. It is read at each new
	// connection, so that a new password needs no restart.
	PasswordFile string
	// SentinelUsername and the two below it are the same for the sentinels;
	// the file is read once.
	SentinelUsername     string
	SentinelPassword     string
	SentinelPasswordFile string
	// TLS are the settings of encrypted connections; nil means plain ones.
	TLS *tls.Config

	// Prefix stands before all keys; "" means "galeward:". It has no braces.
	Prefix string
	// Replicas is on how many replicas a Durable write has to stand before it
	// counts as replicated; 0 where there are none.
	Replicas int
	// WaitTimeout is how long a Durable write waits for the replicas; 0 means
	// 100 ms. It is cut to half of Timeout.
	WaitTimeout time.Duration
	// Timeout is for dialling, for writing and for reading each; 0 means
	// 300 ms.
	Timeout time.Duration
	// PoolSize is how many connections there are to a server at most; 0 means
	// 10 per core.
	PoolSize int
	// Warm is how many connections are held ready; 0 means 2.
	Warm int
}

// complete puts in what was left out and finds what does not fit.
func (o *Options) complete() error {
	switch {
	case len(o.Addrs) == 0:
		return errors.New("redisstore: no address of a server is set")
	case o.Cluster && o.Master != "":
		return errors.New("redisstore: a cluster has no sentinels: set one of the two")
	case o.Cluster && o.DB != 0:
		return errors.New("redisstore: a cluster has only database 0")
	case len(o.Addrs) > 1 && !o.Cluster && o.Master == "":
		return errors.New("redisstore: several addresses need the name of the master or the cluster setting")
	case strings.ContainsAny(o.Prefix, "{}"):
		return errors.New("redisstore: a prefix has no braces")
	case o.Replicas < 0:
		return errors.New("redisstore: a negative number of replicas")
	}
	o.setDefaults()
	var err error
	if _, err = secret("password", o.Password, o.PasswordFile); err != nil {
		return err
	}
	o.SentinelPassword, err = secret("sentinel password", o.SentinelPassword, o.SentinelPasswordFile)
	return err
}

func (o *Options) setDefaults() {
	if o.Prefix == "" {
		o.Prefix = "galeward:"
	}
	if o.Timeout <= 0 {
		o.Timeout = 300 * time.Millisecond
	}
	if o.WaitTimeout <= 0 {
		o.WaitTimeout = 100 * time.Millisecond
	}
	o.WaitTimeout = max(min(o.WaitTimeout, o.Timeout/2), time.Millisecond) // the reply to it is read within Timeout
	if o.Warm <= 0 {
		o.Warm = 2
	}
}

// secret is what is set, or what the file holds without its line's end.
func secret(name, set, file string) (string, error) {
	if file == "" {
		return set, nil
	}
	if set != "" {
		return "", fmt.Errorf("redisstore: the %s is set twice, by itself and by a file", name)
	}
	text, err := os.ReadFile(file)
	if err != nil {
		return "", fmt.Errorf("%w: the file of the %s: %w", errSecret, name, err)
	}
	if s := strings.TrimRight(string(text), "\r\n"); s != "" {
		return s, nil
	}
	return "", fmt.Errorf("%w: the file of the %s is empty: %s", errSecret, name, file)
}

// universal are the client's settings. It never tries again by itself, because
// it can't know what may be done twice, and it heeds the caller's deadline.
func (o Options) universal() *redis.UniversalOptions {
	return &redis.UniversalOptions{
		Addrs: o.Addrs, MasterName: o.Master, IsClusterMode: o.Cluster, DB: o.DB,
		CredentialsProviderContext: func(context.Context) (string, string, error) {
			password, err := secret("password", o.Password, o.PasswordFile)
			return o.Username, password, err
		},
		SentinelUsername: o.SentinelUsername, SentinelPassword: o.SentinelPassword, TLSConfig: o.TLS,
		ContextTimeoutEnabled: true,
		DialTimeout:           o.Timeout, ReadTimeout: o.Timeout, WriteTimeout: o.Timeout,
		MaxRetries: -1, DialerRetries: 1,
		PoolSize: o.PoolSize, MinIdleConns: o.Warm, PoolTimeout: time.Second,
		PipelinePoolSize: -1, // durable writes take the warm connections too
		// What follows keeps the opening of a connection to what old servers
		// and narrow users can answer.
		Protocol: 2, DisableIdentity: true,
		MaintNotificationsConfig: &maintnotifications.Config{Mode: maintnotifications.ModeDisabled},
	}
}
