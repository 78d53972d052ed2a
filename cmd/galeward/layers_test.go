package main

import (
	"encoding/json"
	"fmt"
	"io"
	"io/fs"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

// A layer is who may import whom, for one package or for all that match. The
// first layer that matches counts. The standard library may always be imported.
// depguard in .golangci.yml says the same to an editor; TestLinterAgrees holds
// the two together. Test files may import more: they are not looked at.
type layer struct {
	packages string   // path below the module; /* stands for all others beside it
	may      []string // path below the module, or a module; /... with what is below
	anyOther bool     // any module that is not ours
	why      string
}

var layers = []layer{
	{"physio", []string{"gonum.org/v1/gonum/..."}, false,
		"physiology is pure functions that every front end shares"},
	{"bot/shorthand", []string{"physio"}, false,
		"reading a line knows quantities and nothing of channels or answers"},
	{"bot/reply", nil, false,
		"an answer is a plain value that every adapter can print"},
	{"bot/store", nil, false,
		"the contract with the stores must not pull a client into the core"},
	{"bot/memory", []string{"physio", "bot/shorthand", "bot/store"}, false,
		"documents hold numbers and rules; the client of a database is an adapter"},
	{"bot/audit", []string{"physio", "bot/shorthand"}, false,
		"rows are judged without a channel"},
	{"bot/picture", []string{"bot/reply", "gonum.org/v1/gonum/...", "gonum.org/v1/plot/..."}, false,
		"a chart is drawn from the reply alone"},
	{"bot", []string{"physio", "bot/shorthand", "bot/reply", "bot/store", "bot/memory", "bot/audit"}, false,
		"the core needs no module: pictures are drawn through an interface, platforms are adapters"},
	{"adapters/memstore", []string{"bot/store"}, false,
		"a store knows the store contract and its own client"},
	{"adapters/boltstore", []string{"bot/store", "go.etcd.io/bbolt/..."}, false,
		"a store knows the store contract and its own client"},
	{"adapters/redisstore", []string{"bot/store", "github.com/redis/go-redis/v9/..."}, false,
		"a store knows the store contract and its own client"},
	{"adapters/storetest", []string{"bot/store"}, true,
		"one suite for all stores knows the contract alone"},
	{"adapters/adaptertest", []string{"bot", "bot/reply"}, true,
		"one suite for all chat adapters knows the contract alone"},
	{"adapters/transport", []string{"golang.org/x/time/..."}, false,
		"what chat adapters share knows no platform and no reply"},
	{"adapters/console", []string{"bot", "bot/reply", "adapters/transport", "golang.org/x/term"}, false,
		"a chat adapter translates: no physiology, no sibling, its own library only"},
	{"adapters/slack", []string{"bot", "bot/reply", "adapters/transport", "github.com/slack-go/slack/..."}, false,
		"a chat adapter translates: no physiology, no sibling, its own library only"},
	{"adapters/slack/slackfake", nil, true,
		"a fake platform speaks the platform's protocol and knows nothing of the bot"},
	{"adapters/*", []string{"bot", "bot/reply", "adapters/transport"}, true,
		"a chat adapter translates: no physiology, no sibling"},
	{"cmd/galeward", []string{"bot/...", "adapters/..."}, true,
		"the binary wires; physiology reaches it through the core alone"},
}

// listed is what go list says of one package.
type listed struct {
	ImportPath string
	Imports    []string
	Standard   bool
}

const module = "galeward/"

// breaches gives one sentence for each import that no layer allows.
func breaches(packages []listed, standard map[string]bool) []string {
	var found []string
	for _, p := range packages {
		path, ours := strings.CutPrefix(p.ImportPath, module)
		if !ours {
			continue
		}
		l, ok := layerOf(path)
		if !ok {
			found = append(found, path+" stands in no layer: give it one in layers_test.go")
			continue
		}
		for _, imported := range p.Imports {
			if !standard[imported] && !l.allows(imported) {
				found = append(found, fmt.Sprintf("%s must not import %s: %s", path, strings.TrimPrefix(imported, module), l.why))
			}
		}
	}
	return found
}

func layerOf(path string) (layer, bool) {
	for _, l := range layers {
		dir, isAll := strings.CutSuffix(l.packages, "/*")
		if l.packages == path || isAll && filepath.Dir(path) == dir {
			return l, true
		}
	}
	return layer{}, false
}

func (l layer) allows(imported string) bool {
	path, ours := strings.CutPrefix(imported, module)
	if !ours && l.anyOther {
		return true
	}
	return slices.ContainsFunc(l.may, func(may string) bool {
		tree, whole := strings.CutSuffix(may, "/...")
		return path == may || whole && (path == tree || strings.HasPrefix(path, tree+"/"))
	})
}

// list asks go list for all packages of the module in dir, with what they
// stand on. -e, because a planted import can make a cycle.
func list(t *testing.T, dir string) (ours []listed, standard map[string]bool) {
	t.Helper()
	cmd := exec.Command("go", "list", "-e", "-deps", "-json=ImportPath,Imports,Standard", "./...")
	cmd.Dir = dir
	cmd.Env = append(os.Environ(), "GOFLAGS=-mod=readonly", "GOPROXY=off", "GOWORK=off")
	out, err := cmd.Output()
	if err != nil {
		t.Fatalf("go list: %v\n%s", err, stderrOf(err))
	}
	standard = map[string]bool{"C": true}
	for d := json.NewDecoder(strings.NewReader(string(out))); ; {
		var p listed
		if err := d.Decode(&p); err == io.EOF {
			return ours, standard
		} else if err != nil {
			t.Fatal(err)
		}
		standard[p.ImportPath] = p.Standard
		if strings.HasPrefix(p.ImportPath, module) {
			ours = append(ours, p)
		}
	}
}

func stderrOf(err error) string {
	if e, ok := err.(*exec.ExitError); ok {
		return string(e.Stderr)
	}
	return ""
}

const root = "../.."

func TestImportLaw(t *testing.T) {
	ours, standard := list(t, root)
	if len(ours) < 10 {
		t.Fatalf("go list found only %d packages of the house", len(ours))
	}
	for _, b := range breaches(ours, standard) {
		t.Error(b)
	}
	for _, l := range layers {
		if !strings.HasSuffix(l.packages, "/*") && l.why == "" {
			t.Errorf("layer %s gives no reason", l.packages)
		}
	}
}

// The law is tried on a copy of the house into which forbidden imports were
// planted: each must be found, with its reason.
func TestPlantedImportIsFound(t *testing.T) {
	dir := t.TempDir()
	copyHouse(t, dir)
	plants := []struct{ in, imports, why string }{
		{"physio", "galeward/bot/reply", "pure functions"},
		{"physio", "github.com/alecthomas/kong", "pure functions"},
		{"bot/store", "galeward/bot/reply", "contract with the stores"},
		{"bot/reply", "galeward/physio", "plain value"},
		{"bot/memory", "go.etcd.io/bbolt", "client of a database"},
		{"bot", "galeward/adapters/memstore", "platforms are adapters"},
		{"bot", "github.com/goccy/go-yaml", "needs no module"},
		{"adapters/console", "galeward/physio", "no physiology"},
		{"adapters/console", "galeward/adapters/memstore", "no sibling"},
		{"adapters/slack", "galeward/bot/shorthand", "translates"},
		{"adapters/boltstore", "galeward/bot", "store contract"},
		{"adapters/newcomer", "galeward/adapters/console", "no sibling"},
		{"cmd/galeward", "galeward/physio", "through the core alone"},
		{"bot/newcomer", "galeward/bot/reply", "stands in no layer"},
	}
	for i, p := range plants {
		plant(t, dir, p.in, i, p.imports)
	}
	ours, standard := list(t, dir)
	found := breaches(ours, standard)
	for _, p := range plants {
		hit := slices.ContainsFunc(found, func(b string) bool {
			return strings.HasPrefix(b, p.in+" ") && strings.Contains(b, p.why) &&
				(strings.Contains(b, strings.TrimPrefix(p.imports, module)) || p.in == "bot/newcomer")
		})
		if !hit {
			t.Errorf("%s importing %s was not found; found:\n%s", p.in, p.imports, strings.Join(found, "\n"))
		}
	}
	if len(found) != len(plants) {
		t.Errorf("planted %d, found %d:\n%s", len(plants), len(found), strings.Join(found, "\n"))
	}
}

func plant(t *testing.T, dir, in string, n int, imports string) {
	t.Helper()
	folder := filepath.Join(dir, in)
	if err := os.MkdirAll(folder, 0o755); err != nil {
		t.Fatal(err)
	}
	name := filepath.Base(in)
	if in == "cmd/galeward" {
		name = "main"
	}
	text := fmt.Sprintf("package %s\n\nimport _ %q\n", name, imports)
	if err := os.WriteFile(filepath.Join(folder, fmt.Sprintf("planted%d.go", n)), []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
}

// copyHouse copies the module file and the code without its tests.
func copyHouse(t *testing.T, to string) {
	t.Helper()
	err := filepath.WalkDir(root, func(path string, e fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		rel, _ := filepath.Rel(root, path)
		switch {
		case e.IsDir() && (e.Name() == "testdata" || strings.HasPrefix(e.Name(), ".") && rel != "."):
			return filepath.SkipDir
		case e.IsDir():
			return os.MkdirAll(filepath.Join(to, rel), 0o755)
		case rel != "go.mod" && rel != "go.sum" && (!strings.HasSuffix(rel, ".go") || strings.HasSuffix(rel, "_test.go")):
			return nil
		}
		text, err := os.ReadFile(path)
		if err != nil {
			return err
		}
		return os.WriteFile(filepath.Join(to, rel), text, 0o600)
	})
	if err != nil {
		t.Fatal(err)
	}
}
