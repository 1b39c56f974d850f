package export

import (
	"bytes"
	"encoding/csv"
	"math"
	"strconv"

	"ohmfolio/generator/library"
	"ohmfolio/generator/material"
	"ohmfolio/generator/quantity"
)

// csvPoints is how many rows a curve has: end to end in even steps.
const csvPoints = 101

// csvHeads are plain ASCII, so that no spreadsheet's code page spoils them;
// every row carries its identity, since rows get copied away from files.
var csvHeads = []string{"material", "data_set", "revision", "fingerprint", "status", "temperature_C", "resistivity_ohm_m",
	"resistance_ratio", "ratio_reference_C", "resistivity_lower_ohm_m", "resistivity_upper_ohm_m"}

// writeCSV writes the adopted curve over its valid range; outside: do not use.
func writeCSV(w *bytes.Buffer, r *material.Record) error {
	c := csv.NewWriter(w)
	c.UseCRLF = true // RFC 4180
	if err := c.Write(csvHeads); err != nil {
		return err
	}
	set := r.Adopted
	if set != nil {
		for _, t := range csvTemperatures(set) {
			if err := c.Write(csvRow(r, set, t)); err != nil {
				return err
			}
		}
	}
	c.Flush()
	return c.Error()
}

func csvTemperatures(set *material.DataSet) []float64 {
	if set.Valid.Hi <= set.Valid.Lo {
		return []float64{set.Valid.Lo}
	}
	list := make([]float64, csvPoints)
	for i := range list {
		list[i] = set.Valid.Lo + float64((set.Valid.Hi-set.Valid.Lo)*float64(i)/(csvPoints-1))
	}
	list[csvPoints-1] = set.Valid.Hi
	return list
}

func csvRow(r *material.Record, set *material.DataSet, t float64) []string {
	row := []string{r.ID, cell(set.Name), strconv.Itoa(r.Revision), r.Fingerprint, string(r.Status), number(t - quantity.ZeroCelsius)}
	row = append(row, told(set.Rho, t), told(set.Ratio, t))
	if set.Ratio == nil {
		row = append(row, "")
	} else {
		row = append(row, number(set.RatioReference-quantity.ZeroCelsius))
	}
	if set.Rho == nil || set.Rho.Limits == nil {
		return append(row, "", "")
	}
	l, ok := set.Rho.Limits.At(t)
	if !ok {
		return append(row, "", "")
	}
	return append(row, number(l.Lower), number(l.Upper))
}

func told(t *material.Told, at float64) string {
	if !t.HasNominal() {
		return ""
	}
	v, ok := t.Nominal.At(at)
	if !ok {
		return ""
	}
	return number(v)
}

// number prints 12 significant digits with a decimal point.
func number(x float64) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return ""
	}
	return strconv.FormatFloat(quantity.Round12(x), 'g', -1, 64)
}

// The CSVW description (W3C "Metadata Vocabulary for Tabular Data"): one
// table schema for all files; units carry their UCUM code.
type csvwTables struct {
	Context     string      `json:"@context"`
	Tables      []csvwTable `json:"tables"`
	TableSchema csvwSchema  `json:"tableSchema"`
}

type csvwTable struct {
	URL         string `json:"url"`
	Title       string `json:"dc:title"`
	TableSchema string `json:"tableSchema,omitempty"` // where it is another than that of the group
}

type csvwSchema struct {
	Columns []csvwColumn `json:"columns"`
}

type csvwColumn struct {
	Name        string `json:"name"`
	Titles      string `json:"titles"`
	Datatype    string `json:"datatype"`
	Description string `json:"dc:description"`
	UCUM        string `json:"schema:unitCode,omitempty"`
}

func describeCSV(lib *library.Library) csvwTables {
	t := csvwTables{Context: "http://www.w3.org/ns/csvw", Tables: []csvwTable{}}
	for _, r := range lib.Materials {
		t.Tables = append(t.Tables, csvwTable{URL: r.ID + ".csv", Title: r.Name})
		t.Tables = append(t.Tables, describePrograms(r)...)
	}
	column := func(name, datatype, unit, description string) {
		t.TableSchema.Columns = append(t.TableSchema.Columns, csvwColumn{name, name, datatype, description, unit})
	}
	column("material", "string", "", "ID of the material")
	column("data_set", "string", "", "the adopted data set")
	column("revision", "integer", "", "revision of the record")
	column("fingerprint", "string", "", "fingerprint of what the record states")
	column("status", "string", "", "draft, in review, released or withdrawn")
	column("temperature_C", "number", "Cel", "temperature; outside the rows given: do not use")
	column("resistivity_ohm_m", "number", "Ohm.m", "volume resistivity; empty when it cannot be told")
	column("resistance_ratio", "number", "1", "resistance of a fixed body over its value at ratio_reference_C")
	column("ratio_reference_C", "number", "Cel", "reference temperature of the ratio")
	column("resistivity_lower_ohm_m", "number", "Ohm.m", "lower limit, worst case of the stated limits; empty when none are stated")
	column("resistivity_upper_ohm_m", "number", "Ohm.m", "upper limit, worst case of the stated limits; empty when none are stated")
	return t
}
