package lawcard_test

import (
	"errors"
	"fmt"
	"os"
	"strings"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawcard"
	"example.com/holdtime/creeplaw/published"
)

// A card in MPa and h, read by a host that works in Pa and s. Numbers invented.
func ExampleRead() {
	const text = `{
	  "format": "holdtime law card", "version": 1,
	  "name": "demonstration steel", "source": "invented", "status": "invented",
	  "units": {"stress": "MPa", "time": "h", "temperature": "degC"},
	  "tested range": {"stress": [60, 200], "temperature": [500, 600], "basis": "invented"},
	  "law": {"kind": "with temperature",
	    "factor": {"kind": "Arrhenius", "parameters": {"activation energy": 300000, "reference temperature": 550}},
	    "law": {"kind": "Norton", "parameters": {"prefactor": 1e-16, "stress exponent": 5}}}
	}`
	card, err := lawcard.Read(strings.NewReader(text), creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second})
	if err != nil {
		fmt.Println(err)
		return
	}
	at := creeplaw.Point{Stress: 100e6, Temperature: 823.15}
	fmt.Printf("%s, in %v: %.3g /s at 100 MPa and 550 °C\n", card.Name, card.Units, card.Law.Rate(at).Value)
	fmt.Printf("tested from %.0f to %.0f MPa\n", card.Tested.Stress.Low/1e6, card.Tested.Stress.High/1e6)
	// Output:
	// demonstration steel, in Pa, s: 2.78e-10 /s at 100 MPa and 550 °C
	// tested from 60 to 200 MPa
}

// A fault is reported with its place; no card is returned.
func ExampleRead_fault() {
	const text = `{
  "format": "holdtime law card", "version": 1,
  "name": "demonstration steel", "source": "invented", "status": "invented",
  "units": {"stress": "MPa", "time": "h", "temperature": "K"},
  "tested range": {"basis": "invented"},
  "law": {"kind": "sum", "laws": [
    {"kind": "Norton", "parameters": {"prefactor": 1e-16, "stress exponent": 5}},
    {"kind": "Norton", "parameters": {"prefactor": 1e-9, "stress exponent": -1}}]}
}`
	_, err := lawcard.Read(strings.NewReader(text), creeplaw.Units{})
	fmt.Println(err)
	var fault *lawcard.CardError
	var bad *creeplaw.ParameterError
	if errors.As(err, &fault) && errors.As(err, &bad) {
		fmt.Printf("%v in line %d: the %s of %s\n", fault.Fault, fault.Line, bad.Parameter, bad.Law)
	}
	// Output:
	// lawcard: 8:77: /law/laws/1/parameters/stress exponent is -1, must be positive and finite
	// bad parameter in line 8: the stress exponent of Norton
}

// A published set as a card. Status and caution go with it.
func ExampleWrite() {
	card := lawcard.Published(published.Steel316At600C())
	card.Caution = strings.SplitAfter(card.Caution, ".")[0] // shortened for this page
	if err := lawcard.Write(os.Stdout, card); err != nil {
		fmt.Println(err)
	}
	// Output:
	// {
	//   "format": "holdtime law card",
	//   "version": 1,
	//   "name": "316 stainless steel at 600 °C, Norton",
	//   "source": "13th International Conference on Fracture, Beijing 2013, paper 1381, table 2",
	//   "status": "verified",
	//   "caution": "A starting point, not design data.",
	//   "units": {
	//     "stress": "MPa",
	//     "time": "h",
	//     "temperature": "K"
	//   },
	//   "tested range": {
	//     "temperature": [873.15, 873.15],
	//     "basis": "the one temperature of the source; the stresses of its tests are not on record here"
	//   },
	//   "law": {
	//     "kind": "Norton",
	//     "parameters": {
	//       "prefactor": 1.47e-29,
	//       "stress exponent": 10.147
	//     }
	//   }
	// }
}

// What a host accepts as the state of the material it can hold to the range that was tested. Numbers invented.
func ExampleCard_Check() {
	law, _ := creeplaw.NewNortonAt(1e-6, 100, 5)
	card := lawcard.Card{
		Name: "demonstration steel", Source: "invented", Status: "invented", Law: law,
		Units: creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour},
		Tested: lawcard.Range{Stress: lawcard.Interval{Low: 60, High: 200}, Time: lawcard.Interval{Low: 100, High: 1e4},
			Basis: "invented"},
	}
	fmt.Println(card.Check(creeplaw.Point{Stress: 120, Strain: 1e-3, Temperature: 823}))
	fmt.Println(card.Check(creeplaw.Point{Stress: 30, Strain: 1e-3, Temperature: 823}))
	fmt.Println(card.CheckTime(1e5))
	// Output:
	// <nil>
	// lawcard: demonstration steel: the stress 30 MPa is outside the tested range, 60 … 200
	// lawcard: demonstration steel: the time 100000 h is outside the tested range, 100 … 10000
}

// A watched law computes the same and tells of every evaluation outside the tested range. Numbers invented.
func ExampleCard_Watch() {
	law, _ := creeplaw.NewNortonAt(1e-6, 100, 5)
	card := lawcard.Card{Law: law, Tested: lawcard.Range{Stress: lawcard.Interval{Low: 60, High: 200}}}
	var outside lawcard.Tally
	watched := card.Watch(&outside)
	for _, stress := range []float64{250, 150, 90, 50, 20} {
		watched.Rate(creeplaw.Point{Stress: stress, Temperature: 823})
	}
	low, _ := outside.Lowest(lawcard.Stress)
	high, _ := outside.Highest(lawcard.Stress)
	fmt.Printf("%d evaluations outside, from %v to %v MPa\n", outside.Count(lawcard.Stress), low, high)
	// Output:
	// 3 evaluations outside, from 20 to 250 MPa
}

// A steep law in Pa: no float64 holds its prefactor, so it comes as the rate at one MPa. Numbers invented.
func ExampleCard_In() {
	law, _ := creeplaw.NewNorton(1e-106, 50)
	card := lawcard.Card{Name: "steep", Source: "invented", Status: "invented", Law: law,
		Units:  creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Second},
		Tested: lawcard.Range{Basis: "invented"}}
	there, err := card.In(creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Second})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, p := range there.Law.(creeplaw.Parametric).Parameters() {
		fmt.Printf("%s %g\n", p.Name, p.Value)
	}
	// Output:
	// rate 1e-106
	// stress 1e+06
	// stress exponent 50
}

// A user's own law that is creeplaw.Parametric goes into cards under a name of the user's (ownSinh is in card_test.go).
func ExampleKinds() {
	kinds := lawcard.Kinds{"our hyperbolic sine": ownSinh{1, 1}}
	card := lawcard.Card{Name: "ours", Source: "invented", Status: "invented", Law: ownSinh{1e-9, 25},
		Units:  creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour},
		Tested: lawcard.Range{Basis: "invented"}}
	var text strings.Builder
	if err := kinds.Write(&text, card); err != nil {
		fmt.Println(err)
		return
	}
	again, err := kinds.Read(strings.NewReader(text.String()), creeplaw.Units{Stress: creeplaw.Pascal, Time: creeplaw.Hour})
	fmt.Println(again.Law, err)
	// Output:
	// {1e-09 2.5e+07} <nil>
}
