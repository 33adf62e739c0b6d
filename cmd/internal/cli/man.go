package cli

import (
	"bytes"
	"io"
	"os"
	"path/filepath"
	"strings"
	"time"

	"github.com/spf13/cobra"
	"github.com/spf13/cobra/doc"

	"headfall/network"
)

func init() { register(groupAbout, newMan) }

func newMan(a *app) *cobra.Command {
	return &cobra.Command{
		Use:   "man DIR",
		Short: "Manual pages, one a command and one a topic, into a folder",
		Long: `Man writes the manual pages to DIR, which must be there: headfall.1 and headfall-run.1 for commands, headfall-units.7
for topics. They say what headfall help says.`,
		Example: `  mkdir -p share/man && headfall man share/man`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) != 1 {
				return bad("headfall man share/man", "man takes one DIR, got %d", len(args))
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error { return a.man(c.Root(), args[0]) },
	}
}

func (a *app) man(root *cobra.Command, dir string) error {
	if info, err := os.Stat(dir); err != nil || !info.IsDir() {
		return bad("mkdir -p "+dir, "there is no folder %s", dir)
	}
	var files outputs
	for _, c := range append(root.Commands(), root) {
		section := "1"
		switch {
		case isTopic(c):
			section = "7"
		case !c.IsAvailableCommand() && c != root:
			continue
		}
		name := strings.ReplaceAll(c.CommandPath(), " ", "-") + "." + section
		files.add(filepath.Join(dir, name), func(w io.Writer) error { return manPage(w, c, section) })
	}
	if err := files.check(); err != nil {
		return err
	}
	return files.save(a.Out)
}

// undated stands in a page for the date that it does not bear: the same program writes the same pages.
const undated = "Jan 0001"

func manPage(w io.Writer, c *cobra.Command, section string) error {
	page := *c
	page.DisableAutoGenTag = true
	page.Long = asBlocks(c.Long)
	var b bytes.Buffer
	err := doc.GenMan(&page, &doc.GenManHeader{Section: section, Date: &time.Time{}, Source: "headfall " + network.Version(), Manual: "headfall"}, &b)
	if err != nil {
		return err
	}
	text := strings.Replace(b.String(), undated, "", 1)
	if isTopic(c) { // nothing to call, no flags
		text = without(text, "\n.SH SYNOPSIS", "\n.SH DESCRIPTION")
		text = without(text, "\n.SH OPTIONS", "\n.SH EXAMPLE")
	}
	_, err = io.WriteString(w, text)
	return err
}

// without cuts out what stands from one mark up to the other.
func without(text, from, to string) string {
	head, rest, found := strings.Cut(text, from)
	if _, tail, ends := strings.Cut(rest, to); found && ends {
		return head + to + tail
	}
	return text
}

// asBlocks keeps the lines of what is no running text: samples of JSON, and what is set in from the margin.
func asBlocks(text string) string {
	parts := strings.Split(text, "\n\n")
	for i, p := range parts {
		if strings.HasPrefix(p, "JSON:") || strings.Contains("\n"+p, "\n  ") {
			parts[i] = "```\n" + p + "\n```"
		}
	}
	return strings.Join(parts, "\n\n")
}
