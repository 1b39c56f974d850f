package material

import (
	"ohmfolio/generator/form"
	"ohmfolio/generator/quantity"
)

// propertyKinds says what kind of quantity each property is.
var propertyKinds = []struct {
	key, doc, example string
	kind              quantity.Kind
}{
	{"density", "Density.", "8.4 g/cm³", quantity.Density},
	{"expansion", "Linear expansion.", "18e-6 /K", quantity.Expansion},
	{"emf_to_copper", "Thermal EMF, alloy minus copper.", "-1 µV/K", quantity.EMF},
	{"thermal_conductivity", "Thermal conductivity.", "22 W/(m·K)", quantity.ThermalConductivity},
	{"specific_heat", "Specific heat.", "410 J/(kg·K)", quantity.SpecificHeat},
	{"melting_temperature", "Melting temperature or range.", "960 °C to 1020 °C", quantity.Temperature},
	{"tensile_strength", "Tensile strength.", "390 MPa", quantity.Stress},
	{"elongation", "Elongation at fracture.", ">= 20 %", quantity.Ratio},
}

func propertyShape(kind quantity.Kind, name, example string) *form.Shape {
	return &form.Shape{Name: name, Doc: "One property with its own source.", Fields: append([]form.Field{
		{Key: "value", Required: true, Is: form.Quantity(kind), Doc: "Value, range or bound, with its unit.", Example: example},
	}, propertyRest...)}
}

var propertyRest = []form.Field{
	{Key: "at", Is: form.Quantity(quantity.Temperature), Doc: "Temperature of the value.", Example: "20 °C"},
	{Key: "window", Is: form.Range(quantity.Temperature), Doc: "Temperatures that a mean value covers.", Example: "20 °C to 100 °C"},
	{Key: "class", Is: form.OneOf("specified", "typical", "measured", "calculated", "textbook"), Doc: "Class of the value.", Example: "typical"},
	{Key: "condition", Is: form.Text, Doc: "Condition that the value holds for.", Example: "annealed"},
	{Key: "source", Required: true, Is: citationType, Doc: "Source of this value.", Example: "alloy-standard"},
	{Key: "note", Is: form.Text, Doc: "A remark that is printed.", Example: "sign not stated by the source"},
}

var serviceShape = &form.Shape{Name: "service_temperature", Doc: "How hot the material may be in service.", Fields: append([]form.Field{
	{Key: "accuracy", Is: form.Quantity(quantity.Temperature), Doc: "Greatest temperature where accuracy counts.", Example: "60 °C"},
	{Key: "continuous", Is: form.Quantity(quantity.Temperature), Doc: "Greatest continuous temperature.", Example: "140 °C"},
}, propertyRest[2:]...)}

func propertiesShape() *form.Shape {
	s := &form.Shape{Name: "properties", Doc: "Properties beside the curve, each with its own source."}
	for _, p := range propertyKinds {
		s.Fields = append(s.Fields, form.Field{Key: p.key, Is: form.Mapping(propertyShape(p.kind, p.key, p.example)), Doc: p.doc})
	}
	s.Fields = append(s.Fields, form.Field{Key: "service_temperature", Is: form.Mapping(serviceShape), Doc: "Service temperature."})
	return s
}

var signOffShape = &form.Shape{Name: "sign_off", Doc: "Who answers for this revision: roles, not names.", Fields: []form.Field{
	{Key: "author", Is: form.Text, Doc: "Role of the author.", Example: "materials desk"},
	{Key: "reviewer", Is: form.Text, Doc: "Role of the reviewer, another one.", Example: "metrology desk"},
	{Key: "date", Is: form.Date, Doc: "Day of the sign-off.", Example: "2026-05-04"},
	{Key: "reason", Is: form.Text, Doc: "Why there is a new revision.", Example: "strip measured"},
	{Key: "due", Is: form.Date, Doc: "Day on which a review is due.", Example: "2028-05-04"},
}}

var limitShape = &form.Shape{Name: "tcr_limits", Doc: "A class figure: a limit of a measure, never a coefficient.", Fields: []form.Field{
	{Key: "measure", Required: true, Is: form.OneOf("box", "chord", "slope"), Doc: "Measure that is limited.", Example: "box"},
	{Key: "reference_temperature", Is: form.Quantity(quantity.Temperature), Doc: "Reference temperature of the measure.", Example: "20 °C"},
	{Key: "window", Required: true, Is: form.Range(quantity.Temperature), Doc: "Window of the measure.", Example: "20 °C to 60 °C"},
	{Key: "from", Required: true, Is: form.Quantity(quantity.Coefficient1), Doc: "Lower limit.", Example: "-10 ppm/K"},
	{Key: "to", Required: true, Is: form.Quantity(quantity.Coefficient1), Doc: "Upper limit.", Example: "10 ppm/K"},
	{Key: "class_name", Is: form.Text, Doc: "Name of the class in its source.", Example: "1"},
	{Key: "source", Required: true, Is: citationType, Doc: "Source of the figure.", Example: "alloy-standard"},
}}

var stockShape = &form.Shape{Name: "stock", Doc: "One form in which the material is held.", Fields: []form.Field{
	{Key: "form", Required: true, Is: form.OneOf("strip", "sheet", "foil", "wire", "bar"), Doc: "Form.", Example: "strip"},
	{Key: "thickness", Is: form.Quantity(quantity.Length), Doc: "Thickness.", Example: "1 mm ± 0.02 mm"},
	{Key: "width", Is: form.Quantity(quantity.Length), Doc: "Width.", Example: "200 mm"},
	{Key: "diameter", Is: form.Quantity(quantity.Length), Doc: "Diameter, bare.", Example: "0.40 mm ± 0.008 mm"},
	{Key: "gauge", Is: form.Text, Doc: "American wire gauge, instead of a diameter.", Example: "AWG 24"},
	{Key: "resistance", Is: form.Quantity(quantity.ResistancePerLength), Doc: "Resistance per length at the reference temperature, as sold.", Example: "3.42 Ω/m ± 5 %"},
	{Key: "source", Is: citationType, Doc: "Source of the size.", Example: "stock-list"},
	{Key: "note", Is: form.Text, Doc: "A remark that is printed.", Example: "spool of 5 kg"},
}}

var recordShape = &form.Shape{Name: "a material record", Doc: "One material. Its ID is the stem of the file's name.", Fields: append([]form.Field{
	{Key: "name", Required: true, Is: form.Text, Doc: "Name: designation, form and condition.", Example: "Copper, annealed"},
	{Key: "family", Is: form.OneOf(string(PureMetals), string(StandardConductors), string(ConductorAlloys), string(ResistanceAlloys), string(HeaterAlloys), string(ThermometerMetals), string(StructuralAlloys)), Doc: "Family: the same plausibility rules fit its members.", Example: "resistance alloys"},
	{Key: "formerly", Is: form.List(form.Text), Doc: "Earlier IDs of the record.", Example: "[copper-strip]"},
	{Key: "designations", Is: form.Named(form.Text), Doc: "Designations by system; short is drawn beside curves. Numbers need quotes.", Example: `{short: CuMn12Ni, number: "2.1362"}`},
	{Key: "composition", Is: form.Named(form.Text), Doc: "Composition by element.", Example: "{Cu: balance, Mn: 12 %}"},
	{Key: "applies_to", Is: form.Text, Doc: "What the values apply to.", Example: "annealed strip, 0.2 mm to 2 mm"},
	{Key: "not_for", Is: form.Text, Doc: "What the material or its values must not be used for.", Example: "continuous service above 80 °C"},
	{Key: "notes", Is: form.Text, Doc: "Remarks that are printed.", Example: "The nominal value differs by standard."},
	{Key: "invented", Is: form.YesNo, Doc: "Demo data, marked on page and sheet.", Example: "yes"},
	{Key: "status", Is: form.OneOf(string(Draft), string(InReview), string(Released), string(Withdrawn)), Doc: "State of the record; draft when it is missing.", Example: "released"},
	{Key: "revision", Is: form.Integer, Doc: "Number of the revision.", Example: "1"},
	{Key: "sign_off", Is: form.Mapping(signOffShape), Doc: "Sign-off of the revision."},
	{Key: "replaced_by", Is: form.Text, Doc: "ID of the record that replaces a withdrawn one.", Example: "cumn12ni"},
	{Key: "withdrawn_reason", Is: form.Text, Doc: "Why the record was withdrawn.", Example: "the standard was replaced"},
	{Key: "adopt", Is: form.Text, Doc: "Name of the data set that is the house value.", Example: "strip-2026"},
	{Key: "data_sets", Is: form.Named(form.Mapping(&form.Shape{Name: "a data set", Doc: "One source's description of the material in one condition.", Fields: dataSetFields})), Doc: "Data sets by name; one of them is adopted."},
	{Key: "tcr_limits", Is: form.List(form.Mapping(limitShape)), Doc: "Class figures."},
	{Key: "properties", Is: form.Mapping(propertiesShape()), Doc: "Other properties."},
	{Key: "stock", Is: form.List(form.Mapping(stockShape)), Doc: "Stock sizes."},
	{Key: "equivalents", Is: form.List(form.Mapping(equivalentShape)), Doc: "What other designations are worth as replacements."},
	{Key: "declarations", Is: form.List(form.Mapping(declarationShape)), Doc: "Statements on restricted substances."},
	{Key: "lots", Is: form.Text, Doc: "CSV of received lots beside the record.", Example: "cumn12ni-lots.csv"},
}, dataSetFields...)}
