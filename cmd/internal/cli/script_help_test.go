package cli_test

import (
	"errors"
	"fmt"
	"os/exec"
	"strconv"
	"strings"
)

func pair(arg string) (key, value string, err error) {
	key, value, found := strings.Cut(arg, "=")
	if !found {
		err = fmt.Errorf("%q is not key=value", arg)
	}
	return key, value, err
}

func exitCode(err error) string {
	var e *exec.ExitError
	if errors.As(err, &e) {
		return strconv.Itoa(e.ExitCode())
	}
	return err.Error()
}
