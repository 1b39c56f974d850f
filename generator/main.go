// Command ohmfolio turns a folder of material records into a reference: a
// static site of material pages, comparison reports and printable sheets.
package main

import (
	"os"

	"ohmfolio/generator/command"
)

func main() {
	os.Exit(command.Run(os.Args[1:], os.Stdout, os.Stderr))
}
