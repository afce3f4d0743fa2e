package bridge

import "syscall/js"

// Name is the global function that Serve registers: it takes a request
// (Uint8Array) and attached bytes (array of Uint8Array), and returns an object
// with reply (Uint8Array) and files (array of Uint8Array).
const Name = "weirmarkHandle"

// Handler answers a request; message.Session has one.
type Handler func(request []byte, attached [][]byte) (reply []byte, files [][]byte)

// Serve registers the handler under Name and never returns, so that the program
// stays alive between calls.
func Serve(handle Handler) {
	register(handle)
	select {}
}

// register puts the handler into the global scope.
func register(handle Handler) {
	js.Global().Set(Name, js.FuncOf(func(_ js.Value, arguments []js.Value) any {
		reply, files := handle(bytesOf(arguments[0]), listOf(arguments[1]))
		answer := js.Global().Get("Object").New()
		answer.Set("reply", arrayOf(reply))
		answer.Set("files", arraysOf(files))
		return answer
	}))
}

// bytesOf copies a Uint8Array.
func bytesOf(array js.Value) []byte {
	bytes := make([]byte, array.Length())
	js.CopyBytesToGo(bytes, array)
	return bytes
}

func listOf(arrays js.Value) [][]byte {
	var list [][]byte
	for i := range arrays.Length() {
		list = append(list, bytesOf(arrays.Index(i)))
	}
	return list
}

// arrayOf copies bytes into a Uint8Array of their own, so that the memory of
// the program may grow or end without harm to it.
func arrayOf(bytes []byte) js.Value {
	array := js.Global().Get("Uint8Array").New(len(bytes))
	js.CopyBytesToJS(array, bytes)
	return array
}

func arraysOf(list [][]byte) js.Value {
	arrays := js.Global().Get("Array").New()
	for i, bytes := range list {
		arrays.SetIndex(i, arrayOf(bytes))
	}
	return arrays
}
