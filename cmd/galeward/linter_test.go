package main

import (
	"os"
	"slices"
	"strings"
	"testing"

	"github.com/goccy/go-yaml"
)

// depguardRule is one rule of the linter's settings.
type depguardRule struct {
	Mode  string   `yaml:"list-mode"`
	Files []string `yaml:"files"`
	Allow []string `yaml:"allow"`
	Deny  []struct {
		Pkg  string `yaml:"pkg"`
		Desc string `yaml:"desc"`
	} `yaml:"deny"`
}

// The linter's settings say what the layers say: the same packages, the same
// imports, the same reasons.
func TestLinterAgrees(t *testing.T) {
	raw, err := os.ReadFile(root + "/.golangci.yml")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Linters struct {
			Settings struct {
				Depguard struct{ Rules map[string]depguardRule }
			}
		}
	}
	if err := yaml.Unmarshal(raw, &file); err != nil {
		t.Fatal(err)
	}
	rules := file.Linters.Settings.Depguard.Rules
	if len(rules) != len(layers) {
		t.Errorf("%d rules for %d layers", len(rules), len(layers))
	}
	for _, l := range layers {
		name := strings.NewReplacer("/", "-", "*", "any").Replace(l.packages)
		rule, ok := rules[name]
		if !ok {
			t.Errorf("no rule %s", name)
			continue
		}
		agree(t, name, rule, l)
	}
}

func agree(t *testing.T, name string, rule depguardRule, l layer) {
	t.Helper()
	if want := map[bool]string{true: "lax", false: "strict"}[l.anyOther]; rule.Mode != want {
		t.Errorf("%s: list-mode %s, want %s", name, rule.Mode, want)
	}
	if len(rule.Files) == 0 || rule.Files[0] != "**/"+l.packages+"/*.go" || !slices.Contains(rule.Files, "!$test") {
		t.Errorf("%s: files %v", name, rule.Files)
	}
	want := []string{"$gostd"}
	for _, may := range l.may {
		tree, whole := strings.CutSuffix(may, "/...")
		if host, _, _ := strings.Cut(tree, "/"); !strings.Contains(host, ".") {
			tree = module + tree
		}
		if !whole {
			tree += "$" // the package alone
		}
		want = append(want, tree)
	}
	if !slices.Equal(rule.Allow, want) {
		t.Errorf("%s: allow %v, want %v", name, rule.Allow, want)
	}
	if len(rule.Deny) == 0 || rule.Deny[0].Pkg+"/" != module {
		t.Errorf("%s does not deny the rest of the house", name)
	}
	for _, d := range rule.Deny {
		if d.Desc != l.why {
			t.Errorf("%s: reason %q, want %q", name, d.Desc, l.why)
		}
	}
}
