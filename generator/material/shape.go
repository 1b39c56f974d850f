package material

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// Shape is the record's shape: the reader checks by it, and the JSON Schema
// for editors is written from it.
func Shape() *form.Shape { return recordShape }

var checkedType = form.Either(form.OneOf("original", "transcription", "memory"), form.Mapping(&form.Shape{
	Name: "checked", Doc: "Against what a value was compared, when and by whom.", Fields: []form.Field{
		{Key: "against", Required: true, Is: form.OneOf("original", "transcription", "memory"), Doc: "What the value was compared with.", Example: "original"},
		{Key: "date", Is: form.Date, Doc: "Day of the comparison.", Example: "2026-03-02"},
		{Key: "by", Is: form.Text, Doc: "Role of the one who compared.", Example: "metrology desk"},
	}}))

// CheckedType is the type of a checked state, which sources use too.
func CheckedType() form.Type { return checkedType }

var citationType = form.Either(form.Text, form.Mapping(&form.Shape{
	Name: "source", Doc: "A citation of an entry of sources.yaml.", Fields: []form.Field{
		{Key: "id", Required: true, Is: form.Text, Doc: "ID in sources.yaml.", Example: "copper-standard"},
		{Key: "where", Is: form.Text, Doc: "Table, page or clause.", Example: "table 1"},
		{Key: "checked", Is: checkedType, Doc: "Checked state of these values, when it differs from the source's.", Example: "transcription"},
	}}))

var tableShape = &form.Shape{Name: "table", Doc: "A printed table. Rows are [temperature, value] in rising temperature.", Fields: []form.Field{
	{Key: "temperature", Required: true, Is: form.UnitOf(quantity.Temperature), Doc: "Unit of the temperatures.", Example: "K"},
	{Key: "resistivity", Is: form.UnitOf(quantity.Resistivity), Doc: "Unit of the values when they are resistivities.", Example: "µΩ·cm"},
	{Key: "conductivity", Is: form.UnitOf(quantity.Conductivity), Doc: "Unit of the values when they are conductivities; %IACS needs quotes.", Example: "MS/m"},
	{Key: "resistance_ratio", Is: form.UnitOf(quantity.Ratio), Doc: "1 when the values are R/R at the reference temperature.", Example: "1"},
	{Key: "rows", Required: true, Is: form.Rows, Doc: "The rows as printed.", Example: "[[100, 0.348], [200, 1.046]]"},
	{Key: "each_row", Is: form.Text, Doc: "± of each row of a table of resistivity or conductivity, as limits or with (k=2) as an uncertainty.", Example: "± 0.5 % (k=2)"},
	{Key: "interpolate", Is: form.OneOf("linear", "monotone"), Doc: "Between rows: linear (usual for ratios), or a monotone cubic (usual for resistivities).", Example: "linear"},
}}

// dataSetFields are the keys of a data set; a record with one data set has
// them at its top level.
var dataSetFields = []form.Field{
	{Key: "source", Is: citationType, Doc: "Where the values come from: an ID of sources.yaml, or {id, where, checked}.", Example: "copper-standard"},
	{Key: "class", Is: form.OneOf("specified", "typical", "measured", "calculated", "textbook"), Doc: "Class of the values. Typical values never form limits.", Example: "specified"},
	{Key: "condition", Is: form.Text, Doc: "Temper, form, heat treatment.", Example: "annealed"},
	{Key: "basis", Is: form.OneOf("resistance", "resistivity", "resistivity, uncorrected"), Doc: "What was measured: resistance of a fixed body, volume resistivity corrected for expansion, or resistivity on the dimensions of one temperature.", Example: "resistance"},
	{Key: "dimensions_at", Is: form.Quantity(quantity.Temperature), Doc: "Temperature of the dimensions, for basis: resistivity, uncorrected.", Example: "20 °C"},
	{Key: "temperature_scale", Is: form.OneOf("ITS-90", "IPTS-68", "IPTS-48", "not stated"), Doc: "Temperature scale of the source.", Example: "ITS-90"},
	{Key: "reference_temperature", Is: form.Quantity(quantity.Temperature), Doc: "Temperature that resistivity and coefficients are told about.", Example: "20 °C"},
	{Key: "valid_range", Is: form.Range(quantity.Temperature), Doc: "Closed range outside which no value is given.", Example: "0 °C to 100 °C"},
	{Key: "resistivity", Is: form.Quantity(quantity.Resistivity), Doc: "Resistivity at the reference temperature.", Example: "1.7241 µΩ·cm"},
	{Key: "conductivity", Is: form.Quantity(quantity.Conductivity), Doc: "Conductivity at the reference temperature, instead of a resistivity.", Example: "58 MS/m"},
	{Key: "mass_resistivity", Is: form.Quantity(quantity.MassResistivity), Doc: "Mass resistivity at the reference temperature; needs a density among the properties.", Example: "0.15328 Ω·g/m²"},
	{Key: "sheet_resistance", Is: form.Quantity(quantity.SheetResistance), Doc: "Resistance of a square at the reference temperature; needs a thickness.", Example: "0.86 mΩ/□"},
	{Key: "thickness", Is: form.Quantity(quantity.Length), Doc: "Thickness that the sheet resistance belongs to.", Example: "0.5 mm"},
	{Key: "alpha", Is: form.Quantity(quantity.Coefficient1), Doc: "Linear coefficient about the reference temperature.", Example: "3.93e-3 /K"},
	{Key: "beta", Is: form.Quantity(quantity.Coefficient2), Doc: "Quadratic coefficient.", Example: "-0.5 ppm/K²"},
	{Key: "gamma", Is: form.Quantity(quantity.Coefficient3), Doc: "Cubic coefficient.", Example: "1e-9 /K³"},
	{Key: "chord", Is: form.Mapping(chordShape), Doc: "A mean coefficient between two temperatures: a straight line over that span.", Example: "{value: 2 ppm/K, from: 15 °C, to: 35 °C}"},
	{Key: "table", Is: form.Mapping(tableShape), Doc: "A printed table instead of coefficients.", Example: "{temperature: K, resistivity: µΩ·cm, rows: [[100, 0.348], [200, 1.046]]}"},
	{Key: "callendar_van_dusen", Is: form.Mapping(callendarShape), Doc: "Coefficients of a platinum thermometer about 0 °C.", Example: "{A: 3.9083e-3 /°C, B: -5.775e-7 /°C², C: -4.183e-12 /°C⁴}"},
	{Key: "bloch_gruneisen", Is: form.Mapping(blochShape), Doc: "Residual resistivity and the Bloch-Grüneisen function.", Example: "{residual: 0.002 µΩ·cm, debye_temperature: 328 K, amplitude: 7.81 µΩ·cm, exponent: 5}"},
	{Key: "tolerance_classes", Is: form.List(form.Mapping(classShape)), Doc: "Tolerance classes of a thermometer, in temperature: ±(at_zero + per_degree·|t|), t in °C.", Example: "[{name: B, at_zero: 0.3 K, per_degree: 0.005}]"},
	{Key: "points", Is: form.Text, Doc: "CSV of measured points beside the record.", Example: "strip-2026.csv"},
	{Key: "fit", Is: form.Mapping(fitShape), Doc: "How the points are fitted.", Example: "{reference_temperature: 25 °C, degree: 3}"},
	{Key: "specimen", Is: form.Mapping(specimenShape), Doc: "Geometry of the measured specimen.", Example: "{between_taps: 200 mm, width: 10 mm, thickness: 1 mm, at: 23 °C}"},
	{Key: "pieces", Is: form.List(form.Text), Doc: "Data sets of this record that adjoin, lowest first.", Example: "[cold, published]"},
}

var chordShape = &form.Shape{Name: "chord", Doc: "A mean coefficient between two temperatures.", Fields: []form.Field{
	{Key: "value", Required: true, Is: form.Quantity(quantity.Coefficient1), Doc: "Mean coefficient.", Example: "2 ppm/K"},
	{Key: "from", Required: true, Is: form.Quantity(quantity.Temperature), Doc: "Temperature that the change is counted from.", Example: "15 °C"},
	{Key: "to", Required: true, Is: form.Quantity(quantity.Temperature), Doc: "The other temperature.", Example: "35 °C"},
}}

var callendarShape = &form.Shape{Name: "callendar_van_dusen", Doc: "R/R0 = 1 + At + Bt² (+ C(t − 100)t³ below 0 °C).", Fields: []form.Field{
	{Key: "A", Required: true, Is: form.Quantity(quantity.Coefficient1), Doc: "A.", Example: "3.9083e-3 /°C"},
	{Key: "B", Required: true, Is: form.Quantity(quantity.Coefficient2), Doc: "B.", Example: "-5.775e-7 /°C²"},
	{Key: "C", Is: form.Quantity(quantity.Coefficient4), Doc: "C, used below 0 °C.", Example: "-4.183e-12 /°C⁴"},
}}

var blochShape = &form.Shape{Name: "bloch_gruneisen", Doc: "ρ = residual + amplitude (T/Θ)ⁿ Jₙ(Θ/T).", Fields: []form.Field{
	{Key: "residual", Required: true, Is: form.Quantity(quantity.Resistivity), Doc: "Residual resistivity.", Example: "0.002 µΩ·cm"},
	{Key: "debye_temperature", Required: true, Is: form.Quantity(quantity.Temperature), Doc: "Θ.", Example: "328 K"},
	{Key: "amplitude", Required: true, Is: form.Quantity(quantity.Resistivity), Doc: "Amplitude.", Example: "7.81 µΩ·cm"},
	{Key: "exponent", Required: true, Is: form.Integer, Doc: "n: 2, 3 or 5.", Example: "5"},
}}

var classShape = &form.Shape{Name: "tolerance_classes", Doc: "One tolerance class of a thermometer.", Fields: []form.Field{
	{Key: "name", Required: true, Is: form.Text, Doc: "Name of the class.", Example: "B"},
	{Key: "at_zero", Required: true, Is: form.Quantity(quantity.TemperatureDifference), Doc: "Tolerance at 0 °C.", Example: "0.3 K"},
	{Key: "per_degree", Required: true, Is: form.Number, Doc: "What each degree away from 0 °C adds.", Example: "0.005"},
	{Key: "window", Is: form.Range(quantity.Temperature), Doc: "Range over which the source states the class.", Example: "-200 °C to 850 °C"},
}}

var fitShape = &form.Shape{Name: "fit", Doc: "How measured points are fitted.", Fields: []form.Field{
	{Key: "reference_temperature", Required: true, Is: form.Quantity(quantity.Temperature), Doc: "Temperature of the coefficients.", Example: "25 °C"},
	{Key: "degree", Required: true, Is: form.Integer, Doc: "1, 2 or 3.", Example: "2"},
}}

var specimenShape = &form.Shape{Name: "specimen", Doc: "Geometry of a specimen.", Fields: []form.Field{
	{Key: "between_taps", Is: form.Quantity(quantity.Length), Doc: "Length between the potential contacts.", Example: "200.00 mm ± 0.05 mm (k=2)"},
	{Key: "width", Is: form.Quantity(quantity.Length), Doc: "Width of a strip.", Example: "10.02 mm ± 0.02 mm (k=2)"},
	{Key: "thickness", Is: form.Quantity(quantity.Length), Doc: "Thickness of a strip.", Example: "1.004 mm ± 0.004 mm (k=2)"},
	{Key: "diameter", Is: form.Quantity(quantity.Length), Doc: "Diameter of a wire.", Example: "0.400 mm ± 0.002 mm (k=2)"},
	{Key: "mass", Is: form.Quantity(quantity.Mass), Doc: "Mass of the length between the ends.", Example: "21.30 g ± 0.02 g (k=2)"},
	{Key: "length", Is: form.Quantity(quantity.Length), Doc: "Whole length that the mass belongs to.", Example: "1000 mm ± 1 mm (k=2)"},
	{Key: "at", Is: form.Quantity(quantity.Temperature), Doc: "Temperature of the dimensions.", Example: "23 °C"},
	{Key: "thermometer", Is: form.Quantity(quantity.TemperatureDifference), Doc: "Uncertainty common to all temperatures.", Example: "0 K ± 0.04 K (k=2)"},
	{Key: "bridge", Is: form.Quantity(quantity.Ratio), Doc: "Relative uncertainty common to all resistances.", Example: "0 % ± 0.01 % (k=2)"},
}}

// DataSetKeys are the keys of a data set, which stand at the top of a record
// that has only one.
func DataSetKeys() []string {
	list := make([]string, len(dataSetFields))
	for i, f := range dataSetFields {
		list[i] = f.Key
	}
	return list
}
