// Package form reads strict YAML: a declared shape says which keys a mapping
// has and what stands in them. Unknown and repeated keys, wrong types and
// whatever YAML would let pass in silence are findings with a place. The JSON
// Schema for editors is written from the same shape.
package form

import "ohmfolio/generator/quantity"

// A Shape describes a mapping with known keys.
type Shape struct {
	Name, Doc string
	Fields    []Field

	index map[string]int
}

// A Field is one key of a shape.
type Field struct {
	Key      string
	Required bool
	Is       Type
	Doc      string
	Example  string
}

// Type says what may stand at a key.
type Type struct {
	what  what
	kinds []quantity.Kind // quantities and ranges
	words []string        // one of
	shape *Shape          // mapping
	of    *Type           // element of list or named mapping
	any   []Type          // either
}

type what int

const (
	isText what = iota
	isInteger
	isNumber
	isYesNo
	isDate
	isQuantity
	isRange
	isOneOf
	isUnit
	isList
	isMapping
	isNamed
	isRows
	isEither
)

// The plain types.
var (
	Text    = Type{what: isText}
	Integer = Type{what: isInteger}
	Number  = Type{what: isNumber}
	YesNo   = Type{what: isYesNo} // yes or no
	Date    = Type{what: isDate}  // ISO 8601 calendar date
	Rows    = Type{what: isRows}  // list of lists of numbers
)

// Quantity is a number with a unit of one of the kinds.
func Quantity(kinds ...quantity.Kind) Type { return Type{what: isQuantity, kinds: kinds} }

// Range is two values of a kind joined by the word to.
func Range(kind quantity.Kind) Type { return Type{what: isRange, kinds: []quantity.Kind{kind}} }

// UnitOf is the spelling of a unit of a kind, which stands for the numbers of a
// table. Who reads the table tells about units that are not known.
func UnitOf(kind quantity.Kind) Type { return Type{what: isUnit, kinds: []quantity.Kind{kind}} }

// OneOf is one of the words.
func OneOf(words ...string) Type { return Type{what: isOneOf, words: words} }

// List is a sequence of elements of one type.
func List(of Type) Type { return Type{what: isList, of: &of} }

// Mapping is a mapping with the keys of a shape.
func Mapping(shape *Shape) Type { return Type{what: isMapping, shape: shape} }

// Named is a mapping with free keys and values of one type.
func Named(of Type) Type { return Type{what: isNamed, of: &of} }

// Either is whichever of the types fits the YAML: at most one scalar type,
// one list and one mapping.
func Either(types ...Type) Type { return Type{what: isEither, any: types} }

// field finds a key; the index is made once, before shapes are shared.
func (s *Shape) field(key string) *Field {
	if s.index != nil {
		if i, ok := s.index[key]; ok {
			return &s.Fields[i]
		}
		return nil
	}
	for i := range s.Fields {
		if s.Fields[i].Key == key {
			return &s.Fields[i]
		}
	}
	return nil
}

// Keys lists the keys of the shape in order.
func (s *Shape) Keys() []string {
	list := make([]string, len(s.Fields))
	for i, f := range s.Fields {
		list[i] = f.Key
	}
	return list
}

// Shapes are the mappings that stand directly in a value of type t.
func (t Type) Shapes() []*Shape {
	switch t.what {
	case isMapping:
		return []*Shape{t.shape}
	case isList, isNamed:
		return t.of.Shapes()
	case isEither:
		var list []*Shape
		for _, a := range t.any {
			list = append(list, a.Shapes()...)
		}
		return list
	}
	return nil
}
