package memory

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
)

// FileVersion is the version of the readable file form of house rules.
const FileVersion = 1

// mostFile bounds a file of house rules; a full one is a few KiB.
const mostFile = 64 << 10

// DecodeHouse reads house rules from their readable file form, a JSON object
// with the keys of the table in fields.go. All that is not possible is named,
// as Problems; a file of a newer version is a *DocumentError. Nothing is
// applied unless everything is possible.
func DecodeHouse(file []byte) (House, error) {
	if len(file) > mostFile {
		return House{}, fmt.Errorf("the file has %d bytes; house rules have at most %d", len(file), mostFile)
	}
	lines, err := fileLines(file)
	if err != nil {
		return House{}, err
	}
	var h House
	var found Problems
	for _, l := range lines {
		if err := l.apply(&h, &found); err != nil {
			return House{}, err
		}
	}
	h = h.tidy()
	for _, e := range h.problems() {
		if !slices.ContainsFunc(found, func(f *FieldError) bool { return f.Field == e.Field }) {
			found = append(found, e)
		}
	}
	if err := found.err(); err != nil {
		return House{}, err
	}
	return h, nil
}

// fileLine is one key of a file with its value.
type fileLine struct {
	key    string
	raw    json.RawMessage
	double bool
}

// apply sets the rule that the line holds.
func (l fileLine) apply(h *House, found *Problems) error {
	if l.key == "v" {
		return fileVersion(l.raw, found)
	}
	f := fieldByKey(l.key)
	switch {
	case l.double:
		found.add(shown(l.key), "it twice", "each key once", "")
	case f == nil:
		unknownKey(found, l.key, l.raw)
	default:
		if err := f.read(h, l.raw); err != nil {
			var at *FieldError
			if !errors.As(err, &at) {
				at = &FieldError{Field: f.key, Got: shown(string(l.raw)), Want: f.want}
			}
			*found = append(*found, at)
		}
	}
	return nil
}

// unknownKey names a key that is no rule, and the one that was probably meant.
func unknownKey(found *Problems, key string, raw json.RawMessage) {
	want, hint := "a key that is known", perhaps(key, fieldKeys())
	if hint == "" {
		want = "one of the keys " + strings.Join(fieldKeys(), ", ")
	}
	found.add(shown(key), shown(string(raw)), want, hint)
}

func fileVersion(raw json.RawMessage, found *Problems) error {
	var v int
	switch err := json.Unmarshal(raw, &v); {
	case err != nil || v < 1:
		found.add("v", shown(string(raw)), fmt.Sprintf("the file form's version, 1 to %d", FileVersion), "")
	case v > FileVersion:
		return &DocumentError{What: "house rules", Have: v, Can: FileVersion, Err: ErrNewer}
	}
	return nil
}

// fileLines takes the object of a file apart, in its order.
func fileLines(file []byte) ([]fileLine, error) {
	d := json.NewDecoder(bytes.NewReader(file))
	open, err := d.Token()
	if err != nil {
		return nil, syntax(file, d, err)
	}
	if open != json.Delim('{') {
		return nil, errors.New("house rules are one object: { \"units\": \"kPa\", ... }")
	}
	var lines []fileLine
	for d.More() {
		key, err := d.Token()
		if err != nil {
			return nil, syntax(file, d, err)
		}
		l := fileLine{key: key.(string)} // the decoder lets nothing else stand here
		if err := d.Decode(&l.raw); err != nil {
			return nil, syntax(file, d, err)
		}
		l.double = slices.ContainsFunc(lines, func(o fileLine) bool { return o.key == l.key })
		lines = append(lines, l)
	}
	if _, err := d.Token(); err != nil {
		return nil, syntax(file, d, err)
	}
	if _, err := d.Token(); !errors.Is(err, io.EOF) {
		return nil, errors.New("house rules are one object: something stands behind its end")
	}
	return lines, nil
}

// syntax says where a file stops being JSON.
func syntax(file []byte, d *json.Decoder, err error) error {
	if errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF) {
		return fmt.Errorf("the file ends too early, in line %d: house rules are one JSON object", lineOf(bytes.TrimSpace(file)))
	}
	at := d.InputOffset()
	var s *json.SyntaxError
	if errors.As(err, &s) {
		at = s.Offset
	}
	return fmt.Errorf("line %d is not JSON: %v", lineOf(file[:min(int(at), len(file))]), err)
}

// lineOf is the number of the line that a text ends in.
func lineOf(text []byte) int { return bytes.Count(text, []byte("\n")) + 1 }

// Encode writes the rules in their readable file form, without what is not
// set. DecodeHouse reads it back.
func (h House) Encode() ([]byte, error) {
	raw, err := h.file()
	if err != nil {
		return nil, err
	}
	var out bytes.Buffer
	if err := json.Indent(&out, raw, "", "  "); err != nil {
		return nil, err
	}
	out.WriteByte('\n')
	return out.Bytes(), nil
}

// file is the file form on one line.
func (h House) file() ([]byte, error) {
	out := fmt.Appendf(nil, `{"v":%d`, FileVersion)
	for _, f := range houseFields {
		v := f.write(h)
		if v == nil {
			continue
		}
		b, err := json.Marshal(v)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", f.key, err)
		}
		out = fmt.Appendf(out, `,%q:%s`, f.key, b)
	}
	return append(out, '}'), nil
}

// readHouse reads rules that were checked before they were stored: keys that
// this version does not know are left out, values that it can not read are an
// error.
func readHouse(raw []byte) (House, error) {
	lines, err := fileLines(raw)
	if err != nil {
		return House{}, err
	}
	var h House
	var found Problems
	for _, l := range lines {
		if l.key != "v" && fieldByKey(l.key) == nil {
			continue
		}
		if err := l.apply(&h, &found); err != nil {
			return House{}, err
		}
	}
	return h.tidy(), found.err()
}
