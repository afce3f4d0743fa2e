// Package published checks whole chains of the core, from the bytes of a file
// to the compared numbers, against the figures of testdata/published, which
// numpy and scipy computed from the same files without any code of the project.
//
// It holds tests only. Most need the shared files; what they compare with is in
// the repository, so that neither side can move alone.
package published
