package examine

import "ohmfolio/generator/place"

// SARIF 2.1.0 (OASIS standard), the parts that a list of findings needs.
type (
	sarifLog struct {
		Schema  string     `json:"$schema"`
		Version string     `json:"version"`
		Runs    []sarifRun `json:"runs"`
	}
	sarifRun struct {
		Tool       sarifTool     `json:"tool"`
		ColumnKind string        `json:"columnKind"`
		Results    []sarifResult `json:"results"`
	}
	sarifTool struct {
		Driver sarifDriver `json:"driver"`
	}
	sarifDriver struct {
		Name  string      `json:"name"`
		Rules []sarifRule `json:"rules"`
	}
	sarifRule struct {
		ID               string    `json:"id"`
		ShortDescription sarifText `json:"shortDescription"`
		FullDescription  sarifText `json:"fullDescription"`
		Help             sarifText `json:"help"`
	}
	sarifText struct {
		Text string `json:"text"`
	}
	sarifResult struct {
		RuleID    string          `json:"ruleId"`
		Level     string          `json:"level"`
		Message   sarifText       `json:"message"`
		Locations []sarifLocation `json:"locations"`
	}
	sarifLocation struct {
		Physical sarifPhysical `json:"physicalLocation"`
	}
	sarifPhysical struct {
		Artifact sarifArtifact `json:"artifactLocation"`
		Region   *sarifRegion  `json:"region,omitempty"`
	}
	sarifArtifact struct {
		URI string `json:"uri"`
	}
	sarifRegion struct {
		StartLine   int `json:"startLine"`
		StartColumn int `json:"startColumn,omitempty"`
		EndColumn   int `json:"endColumn,omitempty"`
	}
)

// SARIF turns findings into a SARIF 2.1.0 log, to be encoded as JSON. Columns
// are Unicode code points.
func SARIF(findings []place.Finding) any {
	run := sarifRun{ColumnKind: "unicodeCodePoints", Results: []sarifResult{}}
	run.Tool.Driver = sarifDriver{Name: "ohmfolio", Rules: sarifRules(findings)}
	for _, f := range findings {
		message := f.Message
		if f.Mend != "" {
			message += ". Mend: " + f.Mend
		}
		run.Results = append(run.Results, sarifResult{RuleID: f.Code, Level: string(f.Severity), Message: sarifText{message}, Locations: []sarifLocation{locate(f.Position)}})
	}
	return sarifLog{Schema: "https://json.schemastore.org/sarif-2.1.0.json", Version: "2.1.0", Runs: []sarifRun{run}}
}

func sarifRules(findings []place.Finding) []sarifRule {
	used := map[string]bool{}
	for _, f := range findings {
		used[f.Code] = true
	}
	list := []sarifRule{}
	for _, k := range Catalogue() {
		if used[k.Code] {
			list = append(list, sarifRule{k.Code, sarifText{k.Title}, sarifText{k.Explanation}, sarifText{k.Mend}})
			used[k.Code] = false
		}
	}
	return list
}

func locate(p place.Position) sarifLocation {
	l := sarifLocation{Physical: sarifPhysical{Artifact: sarifArtifact{URI: p.File}}}
	if p.Line > 0 {
		l.Physical.Region = &sarifRegion{StartLine: p.Line, StartColumn: p.Column}
		if p.Column > 0 && p.Length > 0 {
			l.Physical.Region.EndColumn = p.Column + p.Length
		}
	}
	return l
}
