package physio

import (
	"encoding/csv"
	"flag"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"
)

// The tests of this file hold the package against general libraries. The
// libraries' numbers stand in testdata/reference, each file with its source;
// deploy/reference.sh makes them afresh and runs these tests on them.
var referenceFolder = flag.String("reference", filepath.Join("..", "testdata", "reference"), "folder of reference files")

// table is a reference file: its rows by column.
type table struct {
	t      *testing.T
	column map[string]int
	rows   [][]string
}

func readTable(t *testing.T, path string) table {
	t.Helper()
	f, err := os.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.Comment = '#'
	rows, err := r.ReadAll()
	if err != nil {
		t.Fatalf("%s: %v", path, err)
	}
	if len(rows) < 3 {
		t.Fatalf("%s holds %d rows", path, len(rows))
	}
	column := map[string]int{}
	for i, name := range rows[0] {
		column[name] = i
	}
	return table{t, column, rows[1:]}
}

func reference(t *testing.T, name string) table {
	t.Helper()
	return readTable(t, filepath.Join(*referenceFolder, name+".csv"))
}

func (tb table) text(row []string, name string) string {
	tb.t.Helper()
	i, ok := tb.column[name]
	if !ok {
		tb.t.Fatalf("no column %q", name)
	}
	return row[i]
}

func (tb table) number(row []string, name string) float64 {
	tb.t.Helper()
	v, err := strconv.ParseFloat(tb.text(row, name), 64)
	if err != nil {
		tb.t.Fatal(err)
	}
	return v
}

// comparison collects the largest difference between the package and a
// library, which must not be above the bound.
type comparison struct {
	what           string
	bound, largest float64
	where          string
	count          int
}

func (c *comparison) see(difference float64, where string, args ...any) {
	c.count++
	if difference = math.Abs(difference); !(difference <= c.largest) {
		c.largest, c.where = difference, fmt.Sprintf(where, args...)
	}
}

func (c *comparison) report(t *testing.T) {
	t.Helper()
	t.Logf("%s: largest difference %.2g of at most %.2g (%s; %d values)", c.what, c.largest, c.bound, c.where, c.count)
	if !(c.largest <= c.bound) || c.count == 0 {
		t.Errorf("%s: difference %v is above %v", c.what, c.largest, c.bound)
	}
}

// Water vapour against both formulations of the International Association for
// the Properties of Water and Steam. The bound is a quarter of the last digit
// that printed tables have.
func TestReferenceWaterVapour(t *testing.T) {
	tb := reference(t, "water")
	body := comparison{what: "water vapour 20-42 C, mmHg", bound: 0.025}
	whole := comparison{what: "water vapour 0-60 C, relative", bound: 0.001}
	for _, row := range tb.rows {
		at := tb.number(row, "celsius")
		got, err := WaterVapour(Celsius(at))
		if err != nil {
			t.Fatal(err)
		}
		for _, column := range []string{"if97", "iapws95"} {
			want := tb.number(row, column)
			whole.see(got.MmHg()/want-1, "%v C, %s", at, column)
			if at >= 20 && at <= 42 {
				body.see(got.MmHg()-want, "%v C, %s", at, column)
			}
		}
	}
	body.report(t)
	whole.report(t)
}

// The standard atmosphere is a formula in geopotential metres; a height on a
// map is a geometric one, which makes up to half a mmHg at 11 km.
func TestReferenceStandardAtmosphere(t *testing.T) {
	tb := reference(t, "atmosphere")
	exact := comparison{what: "standard atmosphere 0-11 km, geopotential height, mmHg", bound: 0.01}
	mapped := comparison{what: "standard atmosphere 0-11 km, geometric height, mmHg", bound: 0.6}
	for _, row := range tb.rows {
		at := tb.number(row, "metres")
		got, err := StandardAtmosphere(Metres(at))
		if err != nil {
			t.Fatal(err)
		}
		exact.see(got.MmHg()-tb.number(row, "geopotential"), "%v m", at)
		mapped.see(got.MmHg()-tb.number(row, "geometric"), "%v m", at)
	}
	exact.report(t)
	mapped.report(t)
}

// exactUnits are conversions by definition, roundedUnits those whose molar
// masses the trade rounds: 18, 2.8 and 4.6.
var exactUnits = map[string]func(float64) float64{
	"kPa to mmHg": func(v float64) float64 { return KPa(v).MmHg() },
	"mmHg to kPa": func(v float64) float64 { return MmHg(v).KPa() },
	"F to C":      func(v float64) float64 { return float64(Fahrenheit(v)) },
	"in to cm":    func(v float64) float64 { return float64(Inches(v)) },
	"% to 1":      func(v float64) float64 { return float64(Percent(v)) },
}

var roundedUnits = map[string]func(float64) float64{
	"glucose mg/dL to mmol/L":       func(v float64) float64 { return float64(GlucoseMgDL(v)) },
	"urea nitrogen mg/dL to mmol/L": func(v float64) float64 { return float64(UreaNitrogenMgDL(v)) },
	"ethanol mg/dL to mmol/L":       func(v float64) float64 { return float64(EthanolMgDL(v)) },
}

// Units against UCUM, whose millimetre of mercury is rounded at the sixth
// digit.
func TestReferenceUnits(t *testing.T) {
	tb := reference(t, "units")
	exact := comparison{what: "units by definition, relative", bound: 3e-6}
	rounded := comparison{what: "mg/dL by rounded molar masses, relative", bound: 0.002}
	for _, row := range tb.rows {
		name, v, want := tb.text(row, "conversion"), tb.number(row, "value"), tb.number(row, "reference")
		if convert, ok := exactUnits[name]; ok {
			exact.see(convert(v)/want-1, "%v %s", v, name)
		} else if convert, ok := roundedUnits[name]; ok {
			rounded.see(convert(v)/want-1, "%v %s", v, name)
		} else {
			t.Errorf("nothing converts %s", name)
		}
	}
	exact.report(t)
	rounded.report(t)
}

// Bracketed roots against brentq on the same equations, written a second time.
func TestReferenceRoots(t *testing.T) {
	tb := reference(t, "roots")
	po2 := comparison{what: "PO2 at a saturation, relative", bound: 1e-9}
	ph := comparison{what: "pH at a PCO2 and base excess", bound: 1e-9}
	round := comparison{what: "saturation of that PO2, fraction", bound: 1e-9}
	for _, row := range tb.rows {
		given, at := tb.number(row, "given"), tb.number(row, "at")
		pco2 := MmHg(tb.number(row, "pco2"))
		if tb.text(row, "root") == "ph" {
			ph.see(phAtPCO2(given, pco2.MmHg())-at, "base excess %v, PCO2 %v", given, pco2)
			continue
		}
		shift := CurveShift{PH: PH(tb.number(row, "ph")), PaCO2: pco2, COHb: Fraction(tb.number(row, "cohb")), MetHb: Fraction(tb.number(row, "methb"))}
		got, err := PO2At(Fraction(given), shift)
		if err != nil {
			t.Fatal(err)
		}
		po2.see(got.MmHg()/at-1, "saturation %v, %+v", given, shift)
		round.see(saturation(at, shift)-given, "PO2 %v, %+v", at, shift)
	}
	po2.report(t)
	ph.report(t)
	round.report(t)
}
