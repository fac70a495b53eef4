module example.com/onecusp/examples/survey

go 1.26

require (
	example.com/onecusp v0.0.0
	github.com/schollz/progressbar/v3 v3.19.1
)

require (
	github.com/mitchellh/colorstring v0.0.0-20190213212951-d06e56a500db // indirect
	github.com/remyoudompheng/bigfft v0.0.0-20230129092748-24d4a6f8daec // indirect
	github.com/rivo/uniseg v0.4.7 // indirect
	golang.org/x/sys v0.46.0 // indirect
	golang.org/x/term v0.44.0 // indirect
)

replace example.com/onecusp => ../..
