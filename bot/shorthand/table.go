package shorthand

import (
	"iter"
	"strings"
)

// referenceRange is a range in brackets that a print-out puts behind a value.
var referenceRange = lazily(`[(\[]\s*-?\d+(?:[.,]\d+)?\s*(?:-|to)\s*-?\d+(?:[.,]\d+)?\s*[a-z/%0-9]{0,8}\s*[)\]]`)

// dropRanges takes reference ranges out of a pasted print-out.
func dropRanges(s string) string {
	if !strings.ContainsAny(s, "([") {
		return s
	}
	return referenceRange().ReplaceAllString(s, " ")
}

// untable turns a pasted table with a head line into lines of labels and
// values, so that it is read like any other list.
func untable(s string) string {
	lines := strings.Split(s, "\n")
	for i, line := range lines {
		cut := cutter(line)
		if cut == nil {
			continue
		}
		head := cut(line)
		for j := i + 1; j < len(lines); j++ {
			cells := cut(lines[j])
			if len(cells) < 2 || len(cells) > len(head) || !strings.ContainsAny(lines[j], "0123456789") {
				continue
			}
			lines[j] = labelCells(head, cells)
		}
		lines[i] = ""
		return strings.Join(lines, "\n")
	}
	return s
}

func labelCells(head, cells []string) string {
	var b strings.Builder
	for k, c := range cells {
		if c == "" || c == "-" || head[k] == "" {
			continue
		}
		if k > 0 {
			b.WriteString(" , ")
		}
		b.WriteString(head[k] + " " + c)
	}
	return b.String()
}

// cutter gives the way to cut the lines of a table when line is its head: at
// least three names of values and no number among them.
func cutter(line string) func(string) []string {
	for _, sep := range []string{"\t", "|", ";", ","} {
		if strings.Contains(line, sep) && isHead(strings.SplitSeq(strings.Trim(line, sep+" "), sep)) {
			return func(s string) []string { return trimCells(strings.Split(strings.Trim(s, sep+" "), sep)) }
		}
	}
	if isHead(strings.FieldsSeq(line)) {
		return strings.Fields
	}
	return nil
}

func trimCells(cells []string) []string {
	for i := range cells {
		cells[i] = strings.TrimSpace(cells[i])
	}
	return cells
}

func isHead(cells iter.Seq[string]) bool {
	names, bed := 0, false
	for c := range cells {
		c = strings.ToLower(strings.TrimSpace(c))
		e := look(c)
		if e == nil {
			switch c {
			case "time", "pt", "device", "o2", "":
				continue
			}
			return false
		}
		bed = bed || e.sense == senseBed
		if e.sense == senseLabel {
			names++
		}
		if e.sense == senseFiller || e.sense == senseNumber || e.sense == senseAir {
			return false
		}
	}
	return names >= 3 && (bed || names >= 3)
}
