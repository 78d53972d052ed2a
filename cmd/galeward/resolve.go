package main

import (
	"fmt"
	"os"
	"slices"
	"sort"
	"strings"

	"github.com/alecthomas/kong"
	"github.com/goccy/go-yaml"
)

// resolver finds the settings that no flag gave: in the environment, then in
// the settings file. It speaks for settings only; a command's own flags, such
// as those of ask, come from the command line alone.
type resolver struct {
	getenv func(string) string
	read   bool
	path   string
	file   map[string]any
}

var _ kong.Resolver = (*resolver)(nil)

// Resolve gives the value of one flag, nil for none.
func (r *resolver) Resolve(c *kong.Context, _ *kong.Path, flag *kong.Flag) (any, error) {
	if !settingNames()[flag.Name] {
		return nil, nil
	}
	if v := r.getenv(envName(flag.Name)); v != "" {
		return v, nil
	}
	if flag.Name == configName {
		return nil, nil
	}
	if err := r.open(c); err != nil {
		return nil, err
	}
	v, ok := r.file[flag.Name]
	if !ok {
		return nil, nil
	}
	return scalar(v)
}

// Validate refuses a key that is no setting: a misspelt one would be a rule
// that silently does not hold.
func (r *resolver) Validate(*kong.Application) error {
	var unknown []string
	for key := range r.file {
		if !settingNames()[key] || key == configName {
			unknown = append(unknown, key)
		}
	}
	if len(unknown) == 0 {
		return nil
	}
	sort.Strings(unknown)
	return fmt.Errorf("%s: not a setting: %s (see galeward settings)", r.path, strings.Join(unknown, ", "))
}

// open reads the settings file once.
func (r *resolver) open(c *kong.Context) error {
	if r.read {
		return nil
	}
	r.read = true
	r.path = configPath(c, r.getenv)
	if r.path == "" {
		return nil
	}
	raw, err := os.ReadFile(r.path)
	if err != nil {
		return err
	}
	if err := yaml.Unmarshal(raw, &r.file); err != nil {
		return fmt.Errorf("%s: %s", r.path, firstLine(err))
	}
	return nil
}

// configPath finds the file before kong has set any field.
func configPath(c *kong.Context, getenv func(string) string) string {
	for _, p := range slices.Backward(c.Path) {
		if p.Flag != nil && p.Flag.Name == configName {
			return c.Value(p).String()
		}
	}
	return getenv(envName(configName))
}

// scalar makes the text that kong parses, as if it had stood behind a flag.
func scalar(v any) (any, error) {
	switch v := v.(type) {
	case []any:
		parts := make([]string, len(v))
		for i, e := range v {
			parts[i] = fmt.Sprint(e)
		}
		return strings.Join(parts, ","), nil
	case map[string]any, nil:
		return nil, fmt.Errorf("the settings file has no plain value here")
	case bool:
		return v, nil
	default:
		return fmt.Sprint(v), nil
	}
}

// firstLine leaves out the excerpt of the file that the YAML library prints: a
// secret could stand in it by mistake.
func firstLine(err error) string {
	line, _, _ := strings.Cut(err.Error(), "\n")
	return line
}
