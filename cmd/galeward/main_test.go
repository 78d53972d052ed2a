package main

import (
	"os"
	"path/filepath"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
)

// TestMain lets the scripts run the real main by starting the test binary
// under the name galeward.
func TestMain(m *testing.M) {
	testscript.Main(tidy{m}, map[string]func(){"galeward": main})
}

// tidy clears the built binary away after the tests.
type tidy struct{ *testing.M }

func (m tidy) Run() int {
	defer func() { os.RemoveAll(built) }()
	return m.M.Run()
}

// TestScripts runs command lines from end to end: see testdata/script.
func TestScripts(t *testing.T) {
	dir := filepath.Join(root, "testdata", "script")
	scripts, err := filepath.Glob(filepath.Join(dir, "*.txtar"))
	if err != nil || len(scripts) == 0 {
		t.Fatalf("no scripts in %s (%v)", dir, err)
	}
	testscript.Run(t, testscript.Params{
		Dir:                 dir,
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
		Setup: func(e *testscript.Env) error {
			e.Setenv("HOME", e.WorkDir)
			e.Setenv("TERM", "xterm")
			return nil
		},
	})
}
