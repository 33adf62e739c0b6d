package scenarios

import (
	"embed"
	"strings"
)

//go:embed *.yaml
var files embed.FS

const starter = "starter.yaml"

// Starter returns a commented plant file to begin with; it loads.
func Starter() []byte {
	data, err := files.ReadFile(starter)
	if err != nil {
		panic(err) // it is embedded
	}
	return data
}

// Demos returns the names of the demo plants, in alphabetical order.
func Demos() []string {
	entries, err := files.ReadDir(".")
	if err != nil {
		panic(err) // it is embedded
	}
	var all []string
	for _, e := range entries {
		if e.Name() != starter {
			all = append(all, strings.TrimSuffix(e.Name(), ".yaml"))
		}
	}
	return all
}

// Demo returns the file of a demo plant by its name, with or without .yaml.
func Demo(name string) ([]byte, bool) {
	data, err := files.ReadFile(strings.TrimSuffix(name, ".yaml") + ".yaml")
	return data, err == nil
}
