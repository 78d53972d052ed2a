package shorthand

import (
	"encoding/csv"
	"flag"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"galeward/physio"
)

var referenceFolder = flag.String("reference", filepath.Join("..", "..", "testdata", "reference"), "folder of reference files")

// What a person types with a unit against what a UCUM library makes of that
// unit, by definition of the units or by molar mass. A millimetre of mercury and
// a molar mass are rounded in one place or the other.
func TestReferenceTypedUnits(t *testing.T) {
	f, err := os.Open(filepath.Join(*referenceFolder, "units_typed.csv"))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.Comment = '#'
	rows, err := r.ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	const bound = 3e-4 // magnesium is taken as 24.3 g/mol
	largest, where := 0.0, ""
	for _, row := range rows[1:] {
		got, want := typedValue(t, row[0], row[1]), parseNumber(t, row[2])
		if d := math.Abs(got/want - 1); !(d <= largest) {
			largest, where = d, row[0]
		}
	}
	t.Logf("typed units, relative: largest difference %.2g of at most %.2g (%s; %d values)", largest, bound, where, len(rows)-1)
	if !(largest <= bound) || len(rows) < 10 {
		t.Errorf("%q is read %v off the library, at most %v is allowed", where, largest, bound)
	}
}

// typedValue reads the unit behind a gas, as a message would hold it.
func typedValue(t *testing.T, typed, key string) float64 {
	t.Helper()
	q, ok := physio.QuantityByKey(key)
	if !ok {
		t.Fatalf("no quantity %q", key)
	}
	gas := "7.31/55/68/27 "
	if q == physio.PaCO2 || q == physio.PaO2 {
		gas = "ph 7.31 "
	}
	line := Parse(gas+typed, Habits{Addressed: true})
	if len(line.Gases) != 1 {
		t.Fatalf("%q was read as %d gases", typed, len(line.Gases))
	}
	v, ok := line.Gases[0].Sample.Values.Get(q)
	if !ok {
		t.Errorf("%q holds no %s: %+v", typed, key, line.Gases[0])
		return math.NaN()
	}
	return v
}

func parseNumber(t *testing.T, s string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
}
