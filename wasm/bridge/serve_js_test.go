package bridge

import (
	"bytes"
	"syscall/js"
	"testing"
)

// call asks the registered function as a JavaScript host does.
func call(request []byte, attached [][]byte) (reply []byte, files [][]byte) {
	answer := js.Global().Get(Name).Invoke(arrayOf(request), arraysOf(attached))
	return bytesOf(answer.Get("reply")), listOf(answer.Get("files"))
}

// TestCopies shows that bytes arrive whole in both directions, none among them,
// and that neither side keeps the memory of the other.
func TestCopies(t *testing.T) {
	all := make([]byte, 256)
	for i := range all {
		all[i] = byte(i)
	}
	var kept [][]byte
	register(func(request []byte, attached [][]byte) ([]byte, [][]byte) {
		kept = append([][]byte{request}, attached...)
		return request, attached
	})
	for _, row := range [][][]byte{{{}}, {all}, {all, {}, all[:1]}} {
		reply, files := call(row[0], row[1:])
		if !bytes.Equal(reply, row[0]) || len(files) != len(row)-1 {
			t.Fatalf("%d bytes and %d files came back of %d and %d", len(reply), len(files), len(row[0]), len(row)-1)
		}
		for i, file := range files {
			if !bytes.Equal(file, row[i+1]) {
				t.Errorf("file %d came back as %v", i, file)
			}
		}
		if len(reply) > 0 {
			reply[0]++
			if kept[0][0] == reply[0] {
				t.Error("the reply shares memory with what the handler got")
			}
		}
	}
}
