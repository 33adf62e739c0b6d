// Package elementtest holds every kind of element to what its interface promises: documented, built from its own sample, slopes that are the slopes,
// passive parts zero at zero and increasing, finite for any finite input, no allocation. One call of Check in a test does it all.
package elementtest
