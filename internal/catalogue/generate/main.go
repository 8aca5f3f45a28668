// Command generate writes the published JSON Schemas into the folder in which it is run. It is started by
// go generate in the folder schemas.
package main

import (
	"fmt"
	"os"

	"hearduty/internal/catalogue"
)

func main() {
	for _, entry := range catalogue.All() {
		if err := os.WriteFile(entry.Name+".schema.json", entry.Text, 0o644); err != nil {
			fmt.Fprintln(os.Stderr, err)
			os.Exit(1)
		}
	}
}
