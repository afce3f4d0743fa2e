// The start program of Go's js/wasm; web/build takes it from the Go tool that
// builds the core, so that both are of one version.
declare module "go:wasm_exec" {}
