package export

import (
	"bytes"
	"strings"

	"ohmfolio/generator/material"
	"ohmfolio/generator/output"
)

// The columns of the tables for other programs, as W3C CSVW table schemas in
// files of their own: each is shared by all tables of its kind.
var tableSchemas = []struct {
	ending, file string
	columns      []csvwColumn
}{
	{"-lookup.csv", "lookup-columns.json", append([]csvwColumn{
		whole("temperature_millidegree_C", "", "temperature in thousandths of a degree Celsius; outside the rows given: do not use"),
		whole("change_counts", "", "R/R(nominal) - 1 in counts, R of a fixed body"),
		real("count_ppm", "[ppm]", "what one count is"),
		real("straight_line_within_counts", "", "proven distance of the straight line between two rows from the curve, rounding of the rows included"),
		text("outside_rows", "what there is outside the rows"),
		real("nominal_C", "Cel", "nominal temperature of the change"),
	}, identityColumns...)},
	{"-elements.csv", "elements-columns.json", append([]csvwColumn{
		real("temperature_C", "Cel", "temperature, ascending"),
		real("temperature_K", "K", "the same in kelvin"),
		real("resistivity_ohm_m", "Ohm.m", "volume resistivity, for a mesh that grows with temperature"),
		real("resistivity_on_fixed_dimensions_ohm_m", "Ohm.m", "resistivity for a mesh that keeps its dimensions of dimensions_at_C"),
		real("dimensions_at_C", "Cel", "temperature of those dimensions"),
		text("unit_system", "unit system of all columns but temperature_C and dimensions_at_C"),
		text("expansion_in_resistivity", "whether resistivity_ohm_m is corrected for thermal expansion"),
		real("straight_line_within_ppm", "[ppm]", "proven distance of the straight line between two rows from the curve, of the value"),
		text("below_first_row", "what there is below the first row"),
		text("above_last_row", "what there is above the last row"),
	}, identityColumns...)},
}

var identityColumns = []csvwColumn{
	text("material", "ID of the material"), text("data_set", "the data set"), whole("revision", "", "revision of the record"),
	text("fingerprint", "fingerprint of what the record states"), text("status", "state of the record, and whether it may be used"),
}

func text(name, description string) csvwColumn {
	return csvwColumn{name, name, "string", description, ""}
}

func whole(name, unit, description string) csvwColumn {
	return csvwColumn{name, name, "integer", description, unit}
}

func real(name, unit, description string) csvwColumn {
	return csvwColumn{name, name, "number", description, unit}
}

// describePrograms lists the tables of one material with where their columns
// are described.
func describePrograms(r *material.Record) []csvwTable {
	var list []csvwTable
	for _, f := range Files(r) {
		for _, s := range tableSchemas {
			if f.Path != "" && strings.HasSuffix(f.Path, s.ending) {
				list = append(list, csvwTable{strings.TrimPrefix(f.Path, "data/"), r.Name, s.file})
			}
		}
	}
	return list
}

func schemaOutputs() []output.Output {
	var list []output.Output
	for _, s := range tableSchemas {
		list = append(list, output.Output{Path: "data/" + s.file, Write: func(w *bytes.Buffer) error {
			return writeJSON(w, csvwSchema{s.columns})
		}})
	}
	return list
}
