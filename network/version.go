package network

import (
	"runtime/debug"
	"strings"
	"sync"
)

// devel is the version of a program that was not built from a commit, as by go run and go test.
const devel = "0.1.0-devel"

// Version is the version of the program, shown in results and reports: that of the tag which it was built from, or of the commit after it.
var Version = sync.OnceValue(func() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return devel
	}
	return versionOf(info.Main.Version)
})

func versionOf(main string) string {
	if main == "" || main == "(devel)" {
		return devel
	}
	return strings.TrimPrefix(main, "v")
}
