package transcribe

import "ohmfolio/generator/place"

// Kinds documents what a table may be found to have. The triggers are tables,
// not references.
var Kinds = []place.Kind{
	{Code: "table-cell", Severity: place.Warning, Title: "A cell of a table is doubtful",
		Explanation: "The cell is no value of its column for certain: no unit, another unit, a remark inside the number, or a value that no record may state. It stands in the draft as a comment.",
		Trigger:     "Name,Density (g/cm3)\nCopper,about 8.9\n", Mend: "look at the comment in the draft, and write the value that the source prints"},
	{Code: "table-column", Severity: place.Warning, Title: "A column of a table is not understood",
		Explanation: "Columns are known by the words and the unit in their heads. The cells of a column that is not understood stand in the drafts as comments.",
		Trigger:     "Name,Colour\nCopper,red\n", Mend: "name it in a file for --columns"},
	{Code: "table-comma", Severity: place.Error, Title: "A number of a table has a comma",
		Explanation: "A comma is a decimal sign in one country and separates thousands in another. It is read as a decimal sign with --comma only.",
		Trigger:     "Name,Density (g/cm3)\nCopper,\"8,9\"\n", Mend: "give --comma when the whole table has decimal commas; otherwise correct the cell"},
	{Code: "table-encoding", Severity: place.Error, Title: "A table is not in UTF-8",
		Explanation: "In another encoding µ, Ω, ° and ² are lost or become other letters, and a lost µ is a factor of a million.",
		Trigger:     "Name,Resistivity [\xb5Ohm cm]\nCopper,1.7\n", Mend: "open it in the spreadsheet and save as CSV UTF-8"},
	{Code: "table-head", Severity: place.Error, Title: "The head of a table is not understood",
		Explanation: "One row near the top names the columns, and one of them is the name of the material.",
		Trigger:     "Colour,Density (g/cm3)\nred,8.9\n", Mend: "write Name over the names of the materials"},
	{Code: "table-name", Severity: place.Warning, Title: "A row of a table has no name, or one that stands twice",
		Explanation: "The name becomes the name of the record and, in small letters, its ID. A row without a name is left out.",
		Trigger:     "Name,Density (g/cm3)\n,8.9\n", Mend: "give every row a name of its own"},
	{Code: "table-row", Severity: place.Error, Title: "A row of a table cannot be read",
		Explanation: "A quote is open or stands inside a cell, or no draft can be made that a reference accepts.",
		Trigger:     "Name,Density (g/cm3)\nCopper \"soft\" 5,8.9\n", Mend: "look at the quotes in this row"},
	{Code: "table-semicolons", Severity: place.Error, Title: "A table has semicolons between its columns",
		Explanation: "Spreadsheets of some countries save semicolons and decimal commas. They are read with --comma only.",
		Trigger:     "Name;Density (g/cm3)\nCopper;8,9\n", Mend: "give --comma"},
	{Code: "table-sources", Severity: place.Warning, Title: "A cell of a table names an unknown source",
		Explanation: "A column of sources holds IDs of sources.yaml. Another text stands in the draft as a comment, and the row cites the source of the whole table.",
		Trigger:     "Name,Source\nCopper,some book\n", Mend: "add the source to materials/sources.yaml and write its ID"},
	{Code: "table-taken", Severity: place.Error, Title: "A draft would replace a record",
		Explanation: "A file with this name exists in materials/ and is never overwritten. The other rows are written.",
		Mend:        "rename the row in the table, or move the file away"},
}
