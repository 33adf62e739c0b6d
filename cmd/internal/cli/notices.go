package cli

import (
	"embed"
	"fmt"
	"io"
	"path"
	"strings"

	"github.com/spf13/cobra"

	"headfall/viz"
)

// licences of what is linked into the program, a file a module: / in the module's path is written as _.
//
//go:embed notices/*.txt
var notices embed.FS

func init() { register(groupAbout, newLicences) }

func newLicences(a *app) *cobra.Command {
	return &cobra.Command{
		Use:     "licences",
		Aliases: []string{"licenses"},
		Short:   "Licences of the libraries that are part of the program",
		Example: "  headfall licences",
		Args:    none,
		RunE:    func(*cobra.Command, []string) error { return writeNotices(a.Out) },
	}
}

// writeNotices prints every licence text under the name of what it covers.
func writeNotices(w io.Writer) error {
	files, err := notices.ReadDir("notices")
	if err != nil {
		return err
	}
	return buffered(w, func(w io.Writer) error {
		fmt.Fprint(w, "headfall is under the Apache License, version 2.0. It contains the following works under their own terms.\n")
		for _, f := range files {
			data, err := notices.ReadFile(path.Join("notices", f.Name()))
			if err != nil {
				return err
			}
			name := strings.ReplaceAll(strings.TrimSuffix(f.Name(), ".txt"), "_", "/")
			if _, err := fmt.Fprintf(w, "\n%s\n%s\n\n%s\n", name, strings.Repeat("=", len(name)), strings.TrimSpace(string(data))); err != nil {
				return err
			}
		}
		_, err := fmt.Fprintf(w, "\nIn every report\n===============\n\n%s\n", strings.TrimSpace(viz.Notices()))
		return err
	})
}
