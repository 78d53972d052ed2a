package main

import (
	"reflect"
	"strings"
	"sync"
	"time"
)

// These structs are the one table of settings: each field is a flag of its
// name, a variable of the environment (GALEWARD_ and the name in capitals) and
// a key of the settings file. `galeward settings` prints the table.

// fileSetting names the settings file.
type fileSetting struct {
	Config string `name:"config" placeholder:"FILE" help:"A settings file, YAML or JSON, with the names of this list as keys. It can not name another file."`
}

// storeSettings choose what channels' memory is kept in.
type storeSettings struct {
	Store     string `name:"store" enum:"auto,memory,bolt,redis" default:"auto" help:"Where house rules and threads are kept: memory (gone at the end), bolt (one file, one process) or redis (several replicas). Auto is bolt for serve and memory for chat."`
	StateDir  string `name:"state-dir" placeholder:"DIR" help:"The folder of the bolt file. Without it: STATE_DIRECTORY, XDG_STATE_HOME/galeward or ~/.local/state/galeward."`
	BoltFile  string `name:"bolt-file" placeholder:"FILE" help:"The bolt file itself. Without it: galeward.db in the state folder."`
	RedisMode string `name:"redis-mode" enum:"single,sentinel,cluster" default:"single" help:"How the Redis servers work together: single, sentinel or cluster."`

	RedisAddress      []string   `name:"redis-address" placeholder:"HOST:PORT" default:"127.0.0.1:6379" help:"The Redis servers, or the sentinels, separated by commas."`
	RedisMaster       string     `name:"redis-master" placeholder:"NAME" help:"The name of the master that the sentinels watch."`
	RedisUser         string     `name:"redis-user" placeholder:"NAME" help:"The Redis user, where access lists are used."`
	RedisPasswordFile secretFile `name:"redis-password-file" placeholder:"FILE" help:"The file that holds the Redis password."`
	RedisDB           int        `name:"redis-db" placeholder:"N" default:"0" help:"The number of the Redis database."`
	RedisPrefix       string     `name:"redis-prefix" placeholder:"TEXT" default:"galeward:" help:"What stands before every key in Redis."`
	SentinelUser      string     `name:"redis-sentinel-user" placeholder:"NAME" help:"The user of the sentinels themselves, where they have one."`
	SentinelPassword  secretFile `name:"redis-sentinel-password-file" placeholder:"FILE" help:"The file that holds the password of the sentinels."`
	RedisTLS          bool       `name:"redis-tls" help:"Speak TLS with Redis."`
	RedisCAFile       string     `name:"redis-ca-file" placeholder:"FILE" help:"The certificates, PEM, that sign the Redis servers, when the system does not know them. Implies redis-tls."`
	RedisReplicas     int        `name:"redis-replicas" placeholder:"N" default:"0" help:"How many copies a change of house rules must reach before it is called stored."`
}

// serveSettings are those of the service itself.
type serveSettings struct {
	Listen   string        `name:"listen" placeholder:"ADDRESS" default:"127.0.0.1:8080" help:"Where HTTP is served: the platform's requests, /healthz and /readyz. TLS is the work of the proxy in front."`
	Replicas int           `name:"replicas" placeholder:"N" default:"1" help:"How many processes share the store. More than one needs redis."`
	LogLevel string        `name:"log-level" enum:"debug,info,warn,error" default:"info" help:"The least that is logged: debug, info, warn or error. The log goes to standard error, one JSON object a line, and never holds typed text, values or secrets."`
	Drain    time.Duration `name:"drain" placeholder:"TIME" default:"20s" help:"How long answers under way may take after the signal to stop."`
}

// slackSettings connect to Slack over HTTP.
type slackSettings struct {
	SlackSigningSecretFile secretFile `name:"slack-signing-secret-file" placeholder:"FILE" help:"The file that holds the app's signing secret. With it, Slack is served."`
	SlackTokenFile         secretFile `name:"slack-token-file" placeholder:"FILE" help:"The file that holds the bot's token (xoxb-...)."`
	SlackAPI               string     `name:"slack-api" placeholder:"URL" default:"https://slack.com/api/" help:"The address of Slack's interface. Another one is for tests."`
}

// allSettings is the whole table, in the order in which it is printed.
type allSettings struct {
	fileSetting   `group:"Settings file"`
	storeSettings `group:"Store"`
	serveSettings `group:"Service"`
	slackSettings `group:"Slack"`
}

// configName is the one setting that is not a key of the settings file.
const configName = "config"

// settingNames gives every name of the table.
var settingNames = sync.OnceValue(func() map[string]bool {
	names := make(map[string]bool)
	table := reflect.TypeFor[allSettings]()
	for i := range table.NumField() {
		part := table.Field(i).Type
		for j := range part.NumField() {
			names[part.Field(j).Tag.Get("name")] = true
		}
	}
	return names
})

// envName is the variable of a setting.
func envName(name string) string {
	return "GALEWARD_" + strings.ToUpper(strings.ReplaceAll(name, "-", "_"))
}
