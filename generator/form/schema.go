package form

import (
	"bytes"
	"encoding/json"
)

// Schema writes the JSON Schema (draft 2020-12) of a value of type t, so that
// editors complete and check while typing. Quantities are text there: their
// grammar is the program's.
func Schema(t Type, id, title string) ([]byte, error) {
	s := schemaOf(t)
	s["$schema"] = "https://json-schema.org/draft/2020-12/schema"
	s["$id"] = id
	s["title"] = title
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	err := e.Encode(s) // map keys come out sorted
	return b.Bytes(), err
}

type object = map[string]any

func schemaOf(t Type) object {
	switch t.what {
	case isInteger:
		return object{"type": "integer"}
	case isNumber:
		return object{"type": "number"}
	case isYesNo:
		return object{"enum": []any{"yes", "no", true, false}}
	case isDate:
		return object{"type": "string", "pattern": `^\d{4}-\d{2}-\d{2}$`}
	case isOneOf:
		return object{"enum": words(t.words)}
	case isList:
		return object{"type": "array", "items": schemaOf(*t.of)}
	case isRows:
		return object{"type": "array", "items": object{"type": "array", "items": object{"type": "number"}}}
	case isMapping:
		return mappingSchema(t.shape)
	case isNamed:
		return object{"type": "object", "additionalProperties": schemaOf(*t.of)}
	case isEither:
		var list []any
		for _, a := range t.any {
			list = append(list, schemaOf(a))
		}
		return object{"anyOf": list}
	case isRange:
		return object{"type": "string", "description": t.Describe()}
	}
	return object{"type": []any{"string", "number"}, "description": t.Describe()}
}

func words(list []string) []any {
	out := make([]any, len(list))
	for i, w := range list {
		out[i] = w
	}
	return out
}

func mappingSchema(s *Shape) object {
	properties, required := object{}, []any{}
	for _, f := range s.Fields {
		p := schemaOf(f.Is)
		if f.Doc != "" {
			p["description"] = f.Doc
		}
		if f.Example != "" {
			p["examples"] = []any{f.Example}
		}
		properties[f.Key] = p
		if f.Required {
			required = append(required, f.Key)
		}
	}
	o := object{"type": "object", "description": s.Doc, "additionalProperties": false, "properties": properties}
	if len(required) > 0 {
		o["required"] = required
	}
	return o
}
