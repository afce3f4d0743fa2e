package bridge

import "syscall/js"

// ProgressName is the global function that a host may offer to hear how many
// bytes of a file are read of all.
const ProgressName = "weirmarkProgress"

// Progress tells the host how far a file is read; hosts that offer no function
// for it are told nothing.
func Progress(done, total int) {
	if tell := js.Global().Get(ProgressName); tell.Type() == js.TypeFunction {
		tell.Invoke(done, total)
	}
}
