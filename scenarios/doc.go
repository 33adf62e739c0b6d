// Package scenarios reads plant files: YAML in, a network.Plant out. It also writes them in plain form, describes them as a JSON Schema and keeps the
// demo plants.
//
// A file is read in three moves. The YAML becomes a tree of nodes that know their place (tree.go); aliases, copies made by `like` and the steps of a
// case are worked into that tree. The decoder then walks the tree along tables of fields (field.go): a table says for every key how it is written,
// what it means and where its number goes, and the JSON Schema is written from the same tables. Kinds of elements bring their tables with them, by
// elements.Params. Last, what one thing says of another is checked (tags.go, check.go).
//
// Nothing stops at the first fault: all of a file's are collected and come back together, in the order of their places.
package scenarios
