package main

import (
	"os"
	"path/filepath"
)

// boltPath is where the bolt file stands. Its folder is made when it is missing.
func boltPath(s storeSettings, getenv func(string) string) (string, error) {
	path := s.BoltFile
	if path == "" {
		dir, err := stateDir(s.StateDir, getenv)
		if err != nil {
			return "", err
		}
		path = filepath.Join(dir, "galeward.db")
	}
	if err := os.MkdirAll(filepath.Dir(path), 0o700); err != nil {
		return "", usageError{err}
	}
	return path, nil
}

// stateDir is the folder for what is kept: the one that was named, the one
// that systemd made for the service, or the user's own.
func stateDir(named string, getenv func(string) string) (string, error) {
	if named != "" {
		return named, nil
	}
	if dir := getenv("STATE_DIRECTORY"); dir != "" {
		return dir, nil
	}
	if dir := getenv("XDG_STATE_HOME"); dir != "" {
		return filepath.Join(dir, "galeward"), nil
	}
	if home := getenv("HOME"); home != "" {
		return filepath.Join(home, ".local", "state", "galeward"), nil
	}
	return "", usagef("state-dir: neither it nor STATE_DIRECTORY, XDG_STATE_HOME or HOME is set")
}
