package main

import (
	"bytes"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"

	"github.com/alecthomas/kong"
	"github.com/goccy/go-yaml"
)

// parse reads a command line with the real grammar and gives serve's settings.
func parse(t *testing.T, env map[string]string, args ...string) (allSettings, error) {
	t.Helper()
	var cli commandLine
	parser, err := kong.New(&cli, kong.Exit(func(int) { t.Error("kong ended the process") }),
		kong.Resolvers(&resolver{getenv: func(k string) string { return env[k] }}))
	if err != nil {
		t.Fatal(err)
	}
	_, err = parser.Parse(args)
	return cli.Serve.allSettings, err
}

func write(t *testing.T, text string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "file")
	if err := os.WriteFile(path, []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
	return path
}

// The first source that gives a setting counts.
func TestOrderOfSources(t *testing.T) {
	file := write(t, "listen: file:1\nreplicas: 3\nredis-address: [a:1, b:2]\nredis-tls: true\ndrain: 5s\n")
	env := map[string]string{"GALEWARD_CONFIG": file, "GALEWARD_LISTEN": "env:2"}
	s, err := parse(t, env, "serve")
	if err != nil {
		t.Fatal(err)
	}
	if s.Listen != "env:2" || s.Replicas != 3 || !slices.Equal(s.RedisAddress, []string{"a:1", "b:2"}) ||
		!s.RedisTLS || s.Drain.Seconds() != 5 || s.LogLevel != "info" {
		t.Errorf("settings %+v", s)
	}
	if s, err = parse(t, env, "serve", "--listen", "flag:3", "--redis-address", "c:3"); err != nil {
		t.Fatal(err)
	}
	if s.Listen != "flag:3" || !slices.Equal(s.RedisAddress, []string{"c:3"}) {
		t.Errorf("flags do not count first: %+v", s)
	}
	other := write(t, `{"listen": "json:4"}`)
	if s, err = parse(t, map[string]string{"GALEWARD_CONFIG": file}, "serve", "--config", other); err != nil || s.Listen != "json:4" {
		t.Errorf("a JSON file named by the flag: %q, %v", s.Listen, err)
	}
}

func TestSettingsThatCanNotBeUsed(t *testing.T) {
	for name, c := range map[string]struct {
		file string
		env  map[string]string
		args []string
		want string
	}{
		"misspelt key":          {file: "lisn: x", want: "lisn"},
		"secret in the file":    {file: "slack-token: xoxb-1", want: "slack-token"},
		"file names a file":     {file: "config: other", want: "config"},
		"not YAML":              {file: "a: [1\nb", want: "file"},
		"group where a value":   {file: "listen: {a: 1}", want: "no plain value"},
		"nothing where a value": {file: "listen:", want: "no plain value"},
		"wrong choice":          {file: "store: paper", want: "memory"},
		"wrong number":          {env: map[string]string{"GALEWARD_REPLICAS": "two"}, want: "two"},
		"no such file":          {args: []string{"--config", "/no/such"}, want: "/no/such"},
		"secret as a flag":      {args: []string{"--slack-token", "xoxb-1"}, want: "unknown flag"},
	} {
		args := append([]string{"serve"}, c.args...)
		if c.file != "" {
			args = append(args, "--config", write(t, c.file))
		}
		if _, err := parse(t, c.env, args...); err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: error %v, want one with %q", name, err, c.want)
		} else if strings.Contains(err.Error(), "xoxb-1") {
			t.Errorf("%s: the error holds the secret: %v", name, err)
		}
	}
}

// A command's own flags come from the command line alone.
func TestEnvironmentDoesNotSetFlagsOfAsk(t *testing.T) {
	var cli commandLine
	env := map[string]string{"GALEWARD_JSON": "true", "GALEWARD_HOUSE": "/no/such", "GALEWARD_CONFIG": "/no/such"}
	parser, err := kong.New(&cli, kong.Resolvers(&resolver{getenv: func(k string) string { return env[k] }}))
	if err != nil {
		t.Fatal(err)
	}
	if _, err := parser.Parse([]string{"ask", "hello"}); err != nil || cli.Ask.JSON || cli.Ask.House != "" {
		t.Errorf("ask took %+v from the environment, error %v", cli.Ask, err)
	}
}

func TestSecrets(t *testing.T) {
	file, empty := write(t, "  s3cret\n"), write(t, "\n")
	env := func(v string) func(string) string {
		return func(k string) string { return map[string]string{"GALEWARD_SLACK_TOKEN": v}[k] }
	}
	for name, c := range map[string]struct {
		file secretFile
		env  string
		want string
		bad  bool
	}{
		"from the file":        {file: secretFile(file), want: "s3cret"},
		"from the environment": {env: "s3cret\n", want: "s3cret"},
		"not given":            {},
		"given twice":          {file: secretFile(file), env: "other", bad: true},
		"no such file":         {file: "/no/such", bad: true},
		"empty file":           {file: secretFile(empty), bad: true},
		"a folder":             {file: secretFile(t.TempDir()), bad: true},
		"far too large":        {file: secretFile(write(t, strings.Repeat("x", maxSecret+1))), bad: true},
	} {
		got, err := readSecret("slack-token-file", c.file, env(c.env))
		if got.reveal() != c.want || (err != nil) != c.bad {
			t.Errorf("%s: %q, %v", name, got.reveal(), err)
		}
		if err != nil && (strings.Contains(err.Error(), "s3cret") || strings.Contains(err.Error(), "other")) {
			t.Errorf("%s: the error holds a secret: %v", name, err)
		}
		if printed := fmt.Sprintf("%v %+v %#v %s", got, got, got, got); strings.Contains(printed, "s3cret") {
			t.Errorf("%s: printing shows the secret: %s", name, printed)
		}
	}
}

// The sample is read by the real code, and names every key of the table, if
// only as a comment.
func TestSampleSettings(t *testing.T) {
	sample := root + "/deploy/galeward.yaml"
	s, err := parse(t, nil, "serve", "--config", sample)
	if err != nil {
		t.Fatal(err)
	}
	if s.Store != "bolt" || s.StateDir != "/var/lib/galeward" {
		t.Errorf("the sample was not taken: %+v", s)
	}
	raw, err := os.ReadFile(sample)
	if err != nil {
		t.Fatal(err)
	}
	commented := regexp.MustCompile(`(?m)^# ([a-z-]+: )`).ReplaceAll(raw, []byte("$1"))
	var all map[string]any
	if err := yaml.Unmarshal(commented, &all); err != nil {
		t.Fatal(err)
	}
	for name := range settingNames() {
		if _, ok := all[name]; !ok && name != configName {
			t.Errorf("the sample does not name %s", name)
		}
	}
	if len(all) != len(settingNames())-1 {
		t.Errorf("the sample names %d keys, the table has %d", len(all), len(settingNames())-1)
	}
}

// The printed documentation has every setting, and every variable that a file
// of deploy sets is one of the table.
func TestDocumentationAndDeploymentKnowTheTable(t *testing.T) {
	var out bytes.Buffer
	if code := run(t.Context(), process{args: []string{"settings"}, out: &out, errs: &out, getenv: os.Getenv}); code != exitDone {
		t.Fatalf("exit %d: %s", code, out.String())
	}
	for name := range settingNames() {
		if !strings.Contains(out.String(), " --"+name+" ") || !strings.Contains(out.String(), envName(name)+"\n") {
			t.Errorf("the documentation does not have %s", name)
		}
	}
	known := make(map[string]bool)
	for name := range settingNames() {
		known[envName(name)] = true
		known[strings.TrimSuffix(envName(name), "_FILE")] = true
	}
	variable := regexp.MustCompile(`GALEWARD_[A-Z_]+`)
	uses := 0
	err := filepath.WalkDir(root+"/deploy", func(path string, e fs.DirEntry, err error) error {
		if err != nil || e.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		for _, v := range variable.FindAllString(string(text), -1) {
			uses++
			if !known[v] {
				t.Errorf("%s sets %s, which is no setting", path, v)
			}
		}
		return err
	})
	if err != nil || uses == 0 {
		t.Errorf("%d variables found, error %v", uses, err)
	}
}

// Files of several YAML documents are at least YAML.
func TestDeploymentFilesAreYAML(t *testing.T) {
	for _, name := range []string{"compose.yaml", "kubernetes.yaml"} {
		raw, err := os.ReadFile(filepath.Join(root, "deploy", name))
		if err != nil {
			t.Fatal(err)
		}
		documents := 0
		for d := yaml.NewDecoder(bytes.NewReader(raw)); ; documents++ {
			var v map[string]any
			if err := d.Decode(&v); err != nil {
				if err.Error() != "EOF" {
					t.Errorf("%s, document %d: %v", name, documents+1, err)
				}
				break
			}
			if len(v) == 0 {
				t.Errorf("%s, document %d is empty", name, documents+1)
			}
		}
		if documents == 0 {
			t.Errorf("%s holds nothing", name)
		}
	}
}
