package physio_test

import (
	"encoding/csv"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"galeward/physio"
)

// measure computes one published measure from a row's inputs through the
// exported functions.
type measure func(in *inputs) (float64, error)

// notYet lists rows by id that the package does not reach yet, with the reason.
// A row that passes must leave the list.
var notYet = map[string]string{}

// inputs are the named numbers and words of a row. Reading one marks it as
// used: a row whose inputs are not all used is not the check it seems to be.
type inputs struct {
	t    *testing.T
	unit string // in which the row prints its number
	m    map[string]string
	used map[string]bool
}

func parseInputs(t *testing.T, unit, cell string) *inputs {
	in := &inputs{t: t, unit: unit, m: map[string]string{}, used: map[string]bool{}}
	for _, part := range strings.Split(cell, ";") {
		name, value, ok := strings.Cut(strings.TrimSpace(part), "=")
		if !ok {
			name, value = "text", part
		}
		in.m[name] = value
	}
	return in
}

func (in *inputs) has(name string) bool {
	_, ok := in.m[name]
	return ok
}

func (in *inputs) word(name string) string {
	in.t.Helper()
	v, ok := in.m[name]
	if !ok {
		in.t.Fatalf("row has no input %q: %v", name, in.m)
	}
	in.used[name] = true
	return v
}

// f reads a number.
func (in *inputs) f(name string) float64 {
	in.t.Helper()
	v, err := strconv.ParseFloat(in.word(name), 64)
	if err != nil {
		in.t.Fatal(err)
	}
	return v
}

// or reads a number that a row may leave out.
func (in *inputs) or(name string, otherwise float64) float64 {
	in.t.Helper()
	if !in.has(name) {
		return otherwise
	}
	return in.f(name)
}

// pressure reads name_mmhg or name_kpa.
func (in *inputs) pressure(name string) physio.Pressure {
	in.t.Helper()
	if in.has(name + "_kpa") {
		return physio.KPa(in.f(name + "_kpa"))
	}
	return physio.MmHg(in.f(name + "_mmhg"))
}

// in gives a pressure in the row's unit.
func (in *inputs) in(p physio.Pressure, err error) (float64, error) {
	if in.unit == "kPa" {
		return p.KPa(), err
	}
	return p.MmHg(), err
}

func (in *inputs) unused() []string {
	var names []string
	for name := range in.m {
		if !in.used[name] {
			names = append(names, name)
		}
	}
	return names
}

// check is one row in the form both files share.
type check struct {
	id, measure, inputs, unit string
	printed, tolerance        float64
	// equation is what the code has to give where it parts from the source, and
	// rounding half of its last digit.
	equation, rounding float64
	disagree           bool
}

// want is the number the code has to give.
func (c check) want() float64 {
	if c.disagree {
		return c.equation
	}
	return c.printed
}

// within is the row's own tolerance; where source and equation part it is cut
// to half of what parts them, so that the printed number can not pass.
func (c check) within() float64 {
	if c.disagree {
		return max(c.rounding, min(c.tolerance, math.Abs(c.printed-c.equation)/2))
	}
	return c.tolerance
}

var disagrees = regexp.MustCompile(`^DISAGREE recomputed=(\S+) because `)

func readChecks(t *testing.T, file string) []check {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "testdata", "checks", file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	column := map[string]int{}
	for i, name := range rows[0] {
		column[name] = i
	}
	var checks []check
	for _, row := range rows[1:] {
		checks = append(checks, readCheck(t, column, row))
	}
	if len(checks) == 0 {
		t.Fatal("no rows")
	}
	return checks
}

func readCheck(t *testing.T, column map[string]int, row []string) check {
	t.Helper()
	number := func(s string) float64 {
		v, err := strconv.ParseFloat(s, 64)
		if err != nil {
			t.Fatalf("%s: %v", row[0], err)
		}
		return v
	}
	c := check{
		id: row[column["id"]], measure: row[column["measure"]], inputs: row[column["inputs"]], unit: row[column["unit"]],
		printed: number(row[column["expected"]]), tolerance: number(row[column["tolerance"]]),
	}
	if m := disagrees.FindStringSubmatch(row[column["source"]]); m != nil {
		c.disagree, c.equation, c.rounding = true, number(m[1]), halfDigit(m[1])
	}
	if agree, ok := column["agree"]; ok && row[agree] == "NO" {
		printed := row[column["recomputed"]]
		c.disagree, c.equation, c.rounding = true, number(printed), halfDigit(printed)
	}
	return c
}

// halfDigit gives half of the last digit of a printed number: 0.005 of 4.79,
// 5e7 of 1.23e+10.
func halfDigit(printed string) float64 {
	mantissa, exponent, _ := strings.Cut(printed, "e")
	power, _ := strconv.Atoi(exponent) // no exponent reads as 0
	if _, decimals, ok := strings.Cut(mantissa, "."); ok {
		power -= len(decimals)
	}
	return 0.5 * math.Pow10(power)
}

// TestPublishedChecks runs every row of testdata/checks; the rows name their
// sources.
func TestPublishedChecks(t *testing.T) {
	for file, measures := range map[string]map[string]measure{
		"oxygenation_checks.csv": oxygenMeasures,
		"ventilation_checks.csv": ventilationMeasures,
	} {
		t.Run(file, func(t *testing.T) {
			for _, c := range readChecks(t, file) {
				t.Run(c.id, func(t *testing.T) { runCheck(t, c, measures[c.measure]) })
			}
		})
	}
}

func runCheck(t *testing.T, c check, compute measure) {
	if compute == nil {
		t.Fatalf("no formula for measure %q", c.measure)
	}
	in := parseInputs(t, c.unit, c.inputs)
	got, err := compute(in)
	passes := err == nil && math.Abs(got-c.want()) <= c.within()
	if reason, ok := notYet[c.id]; ok {
		if passes {
			t.Errorf("passes now and must leave notYet (%s)", reason)
		}
		return
	}
	if !passes {
		t.Errorf("%s(%s) = %v, %v; want %v within %v", c.measure, c.inputs, got, err, c.want(), c.within())
	}
	if left := in.unused(); len(left) > 0 {
		t.Errorf("inputs not used: %v", left)
	}
}
