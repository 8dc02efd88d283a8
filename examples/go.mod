module example.com/holdtime/examples

go 1.26

require (
	example.com/holdtime v0.0.0
	gonum.org/v1/plot v0.17.0
)

replace example.com/holdtime => ../
