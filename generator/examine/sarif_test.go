package examine

import (
	"bytes"
	"encoding/json"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"

	"ohmfolio/generator/place"
)

// TestSARIF holds the output for the findings of every trigger against the
// schema of the standard.
func TestSARIF(t *testing.T) {
	schema, err := jsonschema.NewCompiler().Compile("testdata/sarif-schema-2.1.0.json")
	if err != nil {
		t.Fatal(err)
	}
	var all []place.Finding
	for _, k := range Catalogue() {
		if k.Trigger != "" {
			all = append(all, examined(k.Trigger, "2099-01-01")...)
		}
	}
	for name, findings := range map[string][]place.Finding{"none": nil, "all": all} {
		text, err := json.Marshal(SARIF(findings))
		if err != nil {
			t.Fatal(err)
		}
		doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
		if err != nil {
			t.Fatal(err)
		}
		if err := schema.Validate(doc); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
	// the schema is a real one: it refuses another version
	doc, _ := jsonschema.UnmarshalJSON(bytes.NewReader([]byte(`{"version": "1.0", "runs": []}`)))
	if schema.Validate(doc) == nil {
		t.Error("the schema accepts anything")
	}
}
