package lawcard_test

import (
	"strings"

	"example.com/holdtime/creeplaw/lawcard"
)

// curved is a card whose law is made of a curve.
func curved(curve string) string {
	return withLaw(`{"kind": "strain-hardened curve", "curve": ` + curve + `}`)
}

// mcvetty is a curve with one of its coefficients given.
func mcvetty(steady string) string {
	return curved(`{"kind": "McVetty", "parameters": {"decay constant": 1e-3}, "transient strain": {"kind": "hyperbolic sine",
    "parameters": {"prefactor": 1e-4, "stress coefficient": 0.02, "exponent": 1}}, "steady rate": ` + steady + `}`)
}

func brokenCurves() []broken {
	const unknown, missing, wrong, bad = lawcard.Unknown, lawcard.Missing, lawcard.WrongType, lawcard.BadParameter
	return []broken{
		{"no curve", withLaw(`§{"kind": "strain-hardened curve"}`), "/law", missing, `has no "curve"`},
		{"a law for a curve", curved(strings.Replace(norton, `"Norton"`, `§"Norton"`, 1)), "/law/curve/kind", unknown,
			`is "Norton", no kind of curve known here; known are "Bailey-Norton", "primary and secondary powers", ` +
				`"Graham-Walles", "Andrade", "logarithmic creep", "McVetty", "Garofalo's transient", "Blackburn", "Findley", ` +
				`"two regimes", "theta projection", "sum of terms"`},
		{"a curve for a law", withLaw(`{"kind": §"McVetty", "parameters": {"decay constant": 1e-3}}`), "/law/kind", unknown,
			`is "McVetty", no kind of law known here; known are ` + kindNames()},
		{"curve without a coefficient", curved(`§{"kind": "Andrade", "steady rate": {"kind": "constant",
    "parameters": {"constant": 1e-6}}}`), "/law/curve", missing, `has no "cube-root coefficient"`},
		{"number for a coefficient", mcvetty("§1e-7"), "/law/curve/steady rate", wrong, "is a number, must be an object"},
		{"kind of coefficient", mcvetty(`{"kind": §"sinh", "parameters": {"prefactor": 1e-9}}`), "/law/curve/steady rate/kind",
			unknown, `is "sinh", no kind of coefficient known here; known are "with temperature", "product", "rate of a law", ` +
				`"constant", "power", "inverse power", "hyperbolic sine", "exponential", "Soderberg", ` +
				`"exponential of stress and temperature"`},
		{"coefficient out of bounds", mcvetty(`{"kind": "power", "parameters": {"prefactor": §-1e-9, "exponent": 3}}`),
			"/law/curve/steady rate/parameters/prefactor", bad, "is -1e-09, must be positive and finite"},
		{"half a coefficient", mcvetty(`{"kind": "power", "parameters": §{"value": 1e-9, "exponent": 3}}`),
			"/law/curve/steady rate/parameters", missing, `has no "stress"; or give "prefactor", "exponent"`},
		{"number of the curve", strings.Replace(mcvetty(`{"kind": "constant", "parameters": {"constant": 1e-6}}`),
			`"decay constant": 1e-3`, `"decay constant": §0`, 1), "/law/curve/parameters/decay constant", bad,
			"is 0, must be positive and finite"},
		{"product of nothing", mcvetty(`{"kind": "product", "factors": §[]}`), "/law/curve/steady rate/factors", missing,
			"has too few entries: 0, must be at least 1"},
		{"law within a coefficient", mcvetty(`{"kind": "rate of a law", "law": ` + strings.Replace(norton, ": 5", ": §-5", 1) +
			`}`), "/law/curve/steady rate/law/parameters/stress exponent", bad, "is -5, must be positive and finite"},
		{"factor within a coefficient", mcvetty(`{"kind": "with temperature", "coefficient": {"kind": "constant",
    "parameters": {"constant": 1}}, "factor": {"kind": "Arrhenius", "parameters": {"activation energy": §-1}}}`),
			"/law/curve/steady rate/factor/parameters/activation energy", bad, "is -1, must be at least 0 and finite"},
		{"function of temperature in degC", inCelsius(mcvetty(`{"kind": §"exponential of stress and temperature",
    "parameters": {"intercept": -20, "coefficient of stress": 0.01, "coefficient of temperature": 0.001,
    "coefficient of the product": 0}}`)), "/law/curve/steady rate/kind", lawcard.BadUnit,
			"is a function of the absolute temperature: the card must be in K"},
		{"half an instantaneous strain", curved(`{"kind": "Findley", "parameters": §{"creep": 8e-5, "creep stress": 163,
    "time exponent": 0.3, "instantaneous strain": 0.008}}`), "/law/curve/parameters", missing,
			`has no "instantaneous stress"; or give "creep", "creep stress", "time exponent"`},
		{"instantaneous strain of zero", curved(`{"kind": "Findley", "parameters": {"creep": 8e-5, "creep stress": 163,
    "time exponent": 0.3, "instantaneous strain": §0, "instantaneous stress": 464}}`),
			"/law/curve/parameters/instantaneous strain", bad, "is 0, must be positive and finite"},
		{"time exponent of matched regimes", curved(`{"kind": "two regimes", "parameters": {"time exponent": §1},
    "primary coefficient": {"kind": "constant", "parameters": {"constant": 1e-4}},
    "steady rate": {"kind": "constant", "parameters": {"constant": 1e-7}}}`), "/law/curve/parameters/time exponent", bad,
			"is 1, must be below 1 for rates to match"},
		{"member of another curve", curved(`{"kind": "logarithmic creep", "strain": {"kind": "constant",
    "parameters": {"constant": 1}}, §"steady rate": {"kind": "constant", "parameters": {"constant": 1}}}`),
			"/law/curve/steady rate", unknown, `is not known here; known are "kind", "strain", "rate constant"`},
	}
}

func brokenTerms() []broken {
	const unknown, missing, bad = lawcard.Unknown, lawcard.Missing, lawcard.BadParameter
	graham := func(term string) string { return curved(`{"kind": "Graham-Walles", "terms": [` + term + `]}`) }
	sum := func(terms string) string { return curved(`{"kind": "sum of terms", "terms": ` + terms + `}`) }
	const constant = `{"kind": "constant", "parameters": {"constant": 1}}`
	cubic := `{"kind": "power of time", "parameters": {"time exponent": 3}, "amplitude": ` + constant + `}`
	return []broken{
		{"term without a parameter", graham(`{"parameters": §{"prefactor": 1e-12, "stress exponent": 4}}`),
			"/law/curve/terms/0/parameters", missing, `has no "time exponent"; or give "prefactor", "stress exponent", ` +
				`"time exponent", "activation energy"; or give "prefactor", "stress exponent", "time exponent", ` +
				`"activation energy", "reference temperature"`},
		{"term out of bounds", graham(`{"parameters": {"prefactor": 1e-12, "stress exponent": 4, "time exponent": 0.3}},
    {"parameters": {"prefactor": 1e-12, "stress exponent": §-4, "time exponent": 1}}`),
			"/law/curve/terms/1/parameters/stress exponent", bad, "is -4, must be positive and finite"},
		{"activation energy of a term", graham(`{"parameters": {"prefactor": 1e-12, "stress exponent": 4, "time exponent": 0.3,
    "activation energy": §-3}}`), "/law/curve/terms/0/parameters/activation energy", bad,
			"is -3, must be at least 0 and finite"},
		{"no terms", sum("§[]"), "/law/curve/terms", missing, "has too few entries: 0, must be at least 1"},
		{"function of time", sum(`[{"kind": §"square root", "amplitude": ` + constant + `}]`), "/law/curve/terms/0/kind",
			unknown, `is "square root", no function of time known here; known are "power of time", "saturating", "growing", ` +
				`"logarithm of time", "hyperbolic"`},
		{"time exponent of a term", sum(strings.Replace(`[`+cubic+`]`, ": 3", ": §-3", 1)),
			"/law/curve/terms/0/parameters/time exponent", bad, "is -3, must be positive and finite"},
		{"term without a rate", sum(`[§{"kind": "saturating", "amplitude": ` + constant + `}]`), "/law/curve/terms/0", missing,
			`has no "rate constant"`},
		{"rate where there is none", sum(strings.Replace(`[`+cubic+`]`, `"amplitude"`, `§"rate constant": `+constant+
			`, "amplitude"`, 1)), "/law/curve/terms/0/rate constant", unknown,
			`is not known here; known are "kind", "parameters", "amplitude"`},
		{"curve that never starts", sum("§[" + cubic + "]"), "/law/curve/terms", bad,
			"is refused: the smallest time exponent is 3, must be at most 1, or creep never starts"},
		{"too many terms", sum("§[" + strings.Repeat(strings.Replace(cubic, "3", "1", 1)+", ", 64) + cubic + "]"),
			"/law/curve/terms", bad, "is refused: the number of terms is 65, must be at most 64"},
	}
}
