package form

import (
	"strings"

	"gopkg.in/yaml.v3"

	"ohmfolio/generator/place"
)

// Read reads src as a mapping of the shape. The node is nil when the text
// cannot be read at all; otherwise the findings tell what is wrong in it.
func Read(src *place.Source, shape *Shape) (*Node, []place.Finding) {
	return ReadAs(src, Mapping(shape))
}

// ReadAs reads src as a value of any type, for files whose keys are free.
func ReadAs(src *place.Source, t Type) (*Node, []place.Finding) {
	r := &reader{src: src, list: place.List{Source: src}}
	root := r.parse()
	if root == nil {
		return nil, r.list.Findings
	}
	n := r.value(root, t)
	return n, r.list.Findings
}

// value checks y against t; nil after a finding that leaves nothing usable.
func (r *reader) value(y *yaml.Node, t Type) *Node {
	if !r.plain(y) {
		return nil
	}
	switch t.what {
	case isEither:
		return r.either(y, t)
	case isMapping:
		return r.mapping(y, t.shape)
	case isNamed:
		return r.named(y, *t.of)
	case isList:
		return r.sequence(y, *t.of)
	case isRows:
		return r.numberRows(y)
	}
	return r.scalar(y, t)
}

// plain refuses the parts of YAML that hide what is written.
func (r *reader) plain(y *yaml.Node) bool {
	switch {
	case y.Kind == yaml.AliasNode:
		r.add("yaml-alias", r.at(y), "an alias (*"+y.Value+") stands here", "write the value out")
	case y.Anchor != "":
		r.add("yaml-alias", r.at(y), "an anchor (&"+y.Anchor+") stands here", "take it out; write values out where they are needed")
	case y.Style&yaml.TaggedStyle != 0:
		r.add("yaml-tag", r.at(y), "a tag ("+y.Tag+") stands here", "take it out: the key says what the value is")
	default:
		return true
	}
	return false
}

func (r *reader) either(y *yaml.Node, t Type) *Node {
	for _, a := range t.any {
		if fits(y, a) {
			return r.value(y, a)
		}
	}
	r.wrongType(y, t)
	return nil
}

func fits(y *yaml.Node, t Type) bool {
	switch t.what {
	case isMapping, isNamed:
		return y.Kind == yaml.MappingNode
	case isList, isRows:
		return y.Kind == yaml.SequenceNode
	}
	return y.Kind == yaml.ScalarNode
}

func (r *reader) wrongType(y *yaml.Node, t Type) {
	r.add("type-wrong", r.at(y), kindOf(y)+" stands where "+t.Describe()+" is needed", "write "+t.Describe())
}

func kindOf(y *yaml.Node) string {
	switch y.Kind {
	case yaml.MappingNode:
		return "a mapping"
	case yaml.SequenceNode:
		return "a list"
	}
	if y.Value == "" {
		return "nothing"
	}
	return quote(y.Value)
}

// Describe says in words what a type is.
func (t Type) Describe() string {
	switch t.what {
	case isMapping:
		return "a mapping with the keys " + strings.Join(t.shape.Keys(), ", ")
	case isNamed:
		return "a mapping of names"
	case isList:
		return "a list"
	case isRows:
		return "a list of rows of numbers"
	case isQuantity:
		return "a " + string(t.kinds[0]) + " with its unit"
	case isRange:
		return "a range of " + string(t.kinds[0])
	case isOneOf:
		return "one of " + strings.Join(t.words, ", ")
	case isInteger:
		return "a whole number"
	case isNumber:
		return "a number"
	case isYesNo:
		return "yes or no"
	case isDate:
		return "a date such as 2026-05-04"
	case isEither:
		var list []string
		for _, a := range t.any {
			list = append(list, a.Describe())
		}
		return strings.Join(list, ", or ")
	}
	return "text"
}

// mapping reads a mapping with known keys.
func (r *reader) mapping(y *yaml.Node, s *Shape) *Node {
	if y.Kind != yaml.MappingNode {
		r.wrongType(y, Mapping(s))
		return nil
	}
	n := r.node(y, isMapping)
	r.pairs(y, n, func(key *yaml.Node) (Type, bool) {
		f := s.field(key.Value)
		if f == nil {
			r.unknownKey(key, s)
			return Type{}, false
		}
		return f.Is, true
	})
	for _, f := range s.Fields {
		if f.Required && !hasKey(y, f.Key) {
			r.add("key-missing", n.Position(), s.Name+" needs the key "+f.Key, "add "+f.Key+": "+f.Example)
		}
	}
	return n
}

func hasKey(y *yaml.Node, key string) bool {
	for i := 0; i+1 < len(y.Content); i += 2 {
		if y.Content[i].Value == key {
			return true
		}
	}
	return false
}

func (r *reader) unknownKey(key *yaml.Node, s *Shape) {
	mend := "the keys of " + s.Name + " are " + strings.Join(s.Keys(), ", ")
	if near := place.Near(key.Value, s.Keys()); near != "" {
		mend = "did you mean " + near + "?"
	}
	r.add("key-unknown", r.at(key), "the key "+quote(key.Value)+" is not one of "+s.Name, mend)
}

// named reads a mapping with free keys.
func (r *reader) named(y *yaml.Node, of Type) *Node {
	if y.Kind != yaml.MappingNode {
		r.wrongType(y, Named(of))
		return nil
	}
	n := r.node(y, isNamed)
	r.pairs(y, n, func(*yaml.Node) (Type, bool) { return of, true })
	return n
}

// pairs reads the keys and values of a mapping; typeOf says what a key holds.
func (r *reader) pairs(y *yaml.Node, n *Node, typeOf func(key *yaml.Node) (Type, bool)) {
	for i := 0; i+1 < len(y.Content); i += 2 {
		key, value := y.Content[i], y.Content[i+1]
		if !r.key(y, i) {
			continue
		}
		if r.splitNumber(y, i+2) {
			i += 2
			continue
		}
		if r.repeated(n, key) {
			continue
		}
		t, ok := typeOf(key)
		if !ok {
			continue
		}
		v := r.value(value, t)
		if v == nil {
			continue
		}
		v.keyAt = r.spot(key)
		n.keys, n.items = append(n.keys, key.Value), append(n.items, v)
	}
}

// key refuses merge keys, and keys that are no plain text.
func (r *reader) key(y *yaml.Node, i int) bool {
	key := y.Content[i]
	if key.Kind != yaml.ScalarNode || !r.plain(key) {
		if key.Kind != yaml.ScalarNode && key.Kind != yaml.AliasNode {
			r.add("type-wrong", r.at(key), "a key must be a word", "write the key as a plain word")
		}
		return false
	}
	if key.Tag == "!!merge" {
		r.add("yaml-alias", r.at(key), "a merge key (<<) stands here", "write the values out")
		return false
	}
	return true
}

// splitNumber finds {value: 8,4 g/cm³}, which YAML reads as two keys: the
// second one, at i, has no value and begins with a digit.
func (r *reader) splitNumber(y *yaml.Node, i int) bool {
	if i+1 >= len(y.Content) {
		return false
	}
	key, value := y.Content[i], y.Content[i+1]
	if y.Style&yaml.FlowStyle == 0 || value.Value != "" || value.Tag != "!!null" || key.Value == "" {
		return false
	}
	before := y.Content[i-1].Value
	if before == "" || !digit(before[len(before)-1]) || !digit(key.Value[0]) {
		return false
	}
	r.add("comma-decimal", r.at(y.Content[i-1]), "the number "+quote(before+","+key.Value)+" has a comma", "write a decimal point: "+before+"."+key.Value)
	return true
}

func digit(c byte) bool { return c >= '0' && c <= '9' }

// repeated reports a key that stands twice, with the other place.
func (r *reader) repeated(n *Node, key *yaml.Node) bool {
	first := n.Get(key.Value)
	if first == nil {
		return false
	}
	f := r.add("key-repeated", r.at(key), "the key "+quote(key.Value)+" stands twice", "keep one of the two")
	f.Also = &place.Also{Position: first.KeyPosition(), Message: "it stands here already"}
	return true
}

func quote(s string) string { return "“" + s + "”" }
