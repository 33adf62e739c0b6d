package text

import "headfall/network"

// Words returns the words of a verdict as they open the page.
func Words(v network.Verdict) string {
	switch v {
	case network.Run:
		return "RUN"
	case network.DoNotRun:
		return "DO NOT RUN"
	case network.TooClose:
		return "TOO CLOSE TO CALL"
	}
	return "NOT JUDGED"
}

// paint makes the words of a verdict stand out on a terminal; the words alone carry the meaning.
func paint(words string, v network.Verdict, colour bool) string {
	if !colour {
		return words
	}
	code := "1;33" // bold yellow: too close, not judged
	switch v {
	case network.Run:
		code = "1;32"
	case network.DoNotRun:
		code = "1;31"
	}
	return "\x1b[" + code + "m" + words + "\x1b[0m"
}
