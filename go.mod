module weirmark

go 1.26

require (
	github.com/dop251/goja v0.0.0-20260917113740-793a2a65c13b
	github.com/evanw/esbuild v0.28.2
	github.com/go-echarts/go-echarts/v2 v2.6.7
	github.com/gocarina/gocsv v0.0.0-20240520201108-78e41c74b4b1
	github.com/syumai/workers v0.32.0
	gonum.org/v1/gonum v0.17.0
	pgregory.net/rapid v1.3.0
)

require (
	github.com/dlclark/regexp2/v2 v2.5.2 // indirect
	github.com/go-sourcemap/sourcemap v2.1.3+incompatible // indirect
	github.com/google/pprof v0.0.0-20230207041349-798e818bf904 // indirect
	golang.org/x/sys v0.0.0-20220715151400-c0bba94af5f8 // indirect
	golang.org/x/text v0.23.0 // indirect
)

tool github.com/syumai/workers/cmd/workers-assets-gen
