// Package published reads the published tables that tests hold the code
// against: CSV files of testdata, each row by the names of its header.
package published

import (
	"encoding/csv"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

// Rows reads testdata/file; a file that cannot be read fails the test.
func Rows(t testing.TB, file string) []map[string]string {
	t.Helper()
	f, err := os.Open(filepath.Join("testdata", file))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil || len(all) < 2 {
		t.Fatalf("%s: %d rows, %v", file, len(all), err)
	}
	var list []map[string]string
	for _, line := range all[1:] {
		row := map[string]string{}
		for i, cell := range line {
			row[all[0][i]] = cell
		}
		list = append(list, row)
	}
	return list
}

// Number reads a cell that must be a number.
func Number(t testing.TB, cell string) float64 {
	t.Helper()
	x, ok := Optional(cell)
	if !ok {
		t.Fatalf("%q is no number", cell)
	}
	return x
}

// Optional reads a cell that may be empty or a remark.
func Optional(cell string) (x float64, ok bool) {
	x, err := strconv.ParseFloat(strings.TrimSpace(cell), 64)
	return x, err == nil
}
