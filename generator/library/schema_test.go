package library

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"gopkg.in/yaml.v3"
)

// TestSchemasAreCurrent keeps the committed JSON Schemas equal to the code;
// UPDATE=1 writes them.
func TestSchemasAreCurrent(t *testing.T) {
	schemas, err := Schemas()
	if err != nil {
		t.Fatal(err)
	}
	for name, want := range schemas {
		file := filepath.Join("schema", name)
		if os.Getenv("UPDATE") == "1" {
			if err := os.MkdirAll("schema", 0o755); err != nil {
				t.Fatal(err)
			}
			if err := os.WriteFile(file, want, 0o644); err != nil {
				t.Fatal(err)
			}
		}
		got, err := os.ReadFile(file)
		if err != nil || !bytes.Equal(got, want) {
			t.Errorf("%s is not what the code says (%v); UPDATE=1 go test ./generator/library writes it", file, err)
		}
	}
	entries, _ := os.ReadDir("schema")
	if len(entries) != len(schemas) {
		t.Errorf("schema/ has %d files, the code makes %d", len(entries), len(schemas))
	}
}

// TestDemoFitsSchemas holds every record, the sources and the settings of the
// demo against the schemas with an independent validator.
func TestDemoFitsSchemas(t *testing.T) {
	compiler := jsonschema.NewCompiler()
	record, err := compiler.Compile("schema/record.schema.json")
	if err != nil {
		t.Fatal(err)
	}
	sources, err := compiler.Compile("schema/sources.schema.json")
	if err != nil {
		t.Fatal(err)
	}
	settings, err := compiler.Compile("schema/reference.schema.json")
	if err != nil {
		t.Fatal(err)
	}
	files, _ := filepath.Glob("../../materials/*.yaml")
	if len(files) < 35 {
		t.Fatalf("only %d records", len(files))
	}
	for _, f := range files {
		schema := record
		if strings.HasSuffix(f, "sources.yaml") {
			schema = sources
		}
		if err := schema.Validate(generic(t, f)); err != nil {
			t.Errorf("%s: %v", f, err)
		}
	}
	if err := settings.Validate(generic(t, "../../content/reference.yaml")); err != nil {
		t.Error(err)
	}
	for _, bad := range []string{"name: X\nresistvity: 1 µΩ·cm\n", "resistivity: 1 µΩ·cm\n", "name: X\nstatus: final\n"} {
		if record.Validate(parsed(t, []byte(bad))) == nil {
			t.Errorf("the schema accepts %q", bad)
		}
	}
}

func generic(t *testing.T, file string) any {
	t.Helper()
	text, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	return parsed(t, text)
}

// parsed reads YAML as editors do, with dates and words left as text.
func parsed(t *testing.T, text []byte) any {
	t.Helper()
	var n yaml.Node
	if err := yaml.Unmarshal(text, &n); err != nil {
		t.Fatal(err)
	}
	return plain(&n)
}

func plain(n *yaml.Node) any {
	switch n.Kind {
	case yaml.DocumentNode:
		return plain(n.Content[0])
	case yaml.MappingNode:
		m := map[string]any{}
		for i := 0; i+1 < len(n.Content); i += 2 {
			m[n.Content[i].Value] = plain(n.Content[i+1])
		}
		return m
	case yaml.SequenceNode:
		list := []any{}
		for _, c := range n.Content {
			list = append(list, plain(c))
		}
		return list
	}
	if n.Tag == "!!int" || n.Tag == "!!float" {
		var x float64
		if n.Decode(&x) == nil {
			return x
		}
	}
	return n.Value
}
