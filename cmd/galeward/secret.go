package main

import (
	"bytes"
	"fmt"
	"os"
	"strings"
)

// secretFile is the name of a file that holds a secret. The secret itself is
// never a flag: command lines can be read by everyone on a machine.
type secretFile string

// secret is a secret that was read. It prints as a word, wherever it goes.
type secret struct{ text string }

// String keeps the secret out of every print and log.
func (secret) String() string { return "(secret)" }

// GoString does so for %#v.
func (secret) GoString() string { return "(secret)" }

// reveal gives the secret to the adapter that needs it.
func (s secret) reveal() string { return s.text }

func (s secret) given() bool { return s.text != "" }

// maxSecret is far above any token: a larger file is a mistake.
const maxSecret = 16 << 10

// readSecret reads the secret called name from its file or from the
// environment, where the value may stand in the variable of the file's setting
// without _FILE. Neither is given: no secret. Errors name the source alone.
func readSecret(name string, file secretFile, getenv func(string) string) (secret, error) {
	variable := strings.TrimSuffix(envName(name), "_FILE")
	value := getenv(variable)
	switch {
	case file == "":
		return secret{strings.TrimSpace(value)}, nil
	case value != "":
		return secret{}, usagef("%s: give the file or %s, not both", name, variable)
	}
	raw, err := os.ReadFile(string(file))
	switch raw = bytes.TrimSpace(raw); {
	case err != nil:
		return secret{}, usageError{fmt.Errorf("%s: %w", name, err)}
	case len(raw) == 0:
		return secret{}, usagef("%s: the file %s is empty", name, file)
	case len(raw) > maxSecret:
		return secret{}, usagef("%s: the file %s is too large for a secret", name, file)
	}
	return secret{string(raw)}, nil
}

// passwordOf gives the password of the environment, or else the file's name:
// the store reads the file itself, each time that it connects.
func passwordOf(name string, file secretFile, getenv func(string) string) (string, string, error) {
	s, err := readSecret(name, file, getenv)
	if err != nil || file != "" {
		return "", string(file), err
	}
	return s.reveal(), "", nil
}
