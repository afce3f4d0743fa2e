// Package door is the edge service's way to the core: POST /v1/message.
//
// The body is a request as the page sends it to its worker, with one more field
// "attached": the bytes that go with the request, each as base64. The answer is
// the reply, with the same field as its last where bytes come with it. Everything
// else in both is passed on byte for byte. Each call has a session of its own;
// nothing is kept between calls.
//
// It refuses other methods (405), other paths (404), bodies that are not JSON by
// name (415) or by content (400), and bodies over the limit (413).
package door
