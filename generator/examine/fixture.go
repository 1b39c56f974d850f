package examine

// Triggers are written as small references. standardFiles gives the sources
// that they cite; released turns a record into one that claims release.
const standardFiles = `-- materials/sources.yaml --
standard: {kind: standard, title: A standard, number: X 1, checked: original}
old-standard: {kind: standard, title: An older standard, number: X 0, checked: original, superseded_by: standard}
recalled: {kind: handbook, title: A handbook, author: an author, checked: memory}
`

// record makes the trigger of a rule from the lines of one record.
func record(lines string) string { return standardFiles + "-- materials/x.yaml --\n" + lines }

// copper is the smallest useful record, plus lines of a rule's own.
func copper(more string) string {
	return record(`name: Copper, annealed
resistivity: 1.7241 µΩ·cm ± 0.5 %
alpha: 3.93e-3 /K
basis: resistance
reference_temperature: 20 °C
valid_range: 0 °C to 100 °C
class: specified
condition: annealed
source: standard
` + more)
}

const signed = `status: released
revision: 1
sign_off: {author: materials desk, reviewer: metrology desk, date: 2026-05-04, reason: first issue, due: 2028-05-04}
`
