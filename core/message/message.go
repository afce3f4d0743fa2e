// Package message is the one door to the core: a request goes in as JSON with
// attached bytes, one reply comes out the same way. The page's worker, the
// command and the edge service all move bytes to and from Handle and know
// nothing else of the core.
package message

// Protocol numbers the shape of requests and replies.
const Protocol = 1

// Session holds the study a page works on. The zero value holds none; requests
// that need no study work on it as well.
type Session struct{}

// Handle answers one request. attached are raw bytes the request refers to by
// position, such as dropped files; the reply may come with bytes of its own.
// Handle never panics on any input: what it cannot do it says in the reply.
func (s *Session) Handle(request []byte, attached [][]byte) (reply []byte, files [][]byte) {
	return nil, nil
}
