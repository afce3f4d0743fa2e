// Package bridge moves bytes between a JavaScript host and the core.
//
// It is the only importer of syscall/js. A request and its attached bytes come
// in as copies of Uint8Arrays and the reply goes out the same way; nothing here
// reads what the bytes say. A panic of the core is not recovered: it ends the
// program, the text of it goes to standard error, and the host, which then has
// no reply in hand, starts a new one.
package bridge
