package lawcard_test

import (
	"slices"
	"strings"

	"example.com/holdtime/creeplaw/lawcard"
)

func brokenLaws() []broken {
	return slices.Concat(brokenPlainLaws(), brokenComposedLaws(), brokenTables(), brokenCurves(), brokenTerms())
}

// deep puts a law inside a sum inside a factor.
func deep(law string) string {
	return withLaw(`{"kind": "with temperature", "factor": {"kind": "Arrhenius", "parameters": {"activation energy": 3e5}},
	"law": {"kind": "sum", "laws": [` + norton + `, ` + law + `]}}`)
}

func brokenPlainLaws() []broken {
	const unknown, missing, wrong, bad = lawcard.Unknown, lawcard.Missing, lawcard.WrongType, lawcard.BadParameter
	const nortonForms = `; or give "rate", "stress", "stress exponent"`
	damage := `"prefactor": 1e-6, "stress exponent": 5, "damage prefactor": 1e-5, "damage stress exponent": 4, "damage exponent": 6,
    "reference stress": 100,`
	return []broken{
		{"no kind", withLaw(`§{"parameters": {"prefactor": 1e-15, "stress exponent": 5}}`), "/law", missing, `has no "kind"`},
		{"kind is a number", in(`"Norton"`, "§5"), "/law/kind", wrong, "is a number, must be a text"},
		{"kind of another case", in(`"Norton"`, `§"norton"`), "/law/kind", unknown, `is "norton", no kind of law known here; ` +
			`known are ` + kindNames()},
		{"no parameters", in(`{"kind": "Norton", "parameters": {"prefactor": 1e-15, "stress exponent": 5}}`,
			`§{"kind": "Norton"}`), "/law", missing, `has no "parameters"`},
		{"parameters are an array", in(`{"prefactor": 1e-15, "stress exponent": 5}`, "§[1e-15, 5]"), "/law/parameters", wrong,
			"is an array, must be an object"},
		{"parameter is missing", in(`{"prefactor": 1e-15, "stress exponent": 5}`, `§{"prefactor": 1e-15}`), "/law/parameters",
			missing, `has no "stress exponent"` + nortonForms},
		{"parameter too many", in(`"stress exponent": 5}`, `"stress exponent": 5, §"activation energy": 3e5}`),
			"/law/parameters/activation energy", unknown,
			`is not known here; known are "prefactor", "stress exponent"` + nortonForms},
		{"parameter misspelt", in(`"stress exponent"`, `§"stres exponent"`), "/law/parameters/stres exponent", unknown,
			`is not known here; known are "prefactor", "stress exponent"` + nortonForms},
		{"two forms in one", in(`"stress exponent"`, `§"rate": 1e-6, "stress exponent"`), "/law/parameters/rate", unknown,
			`is not known here; known are "prefactor", "stress exponent"` + nortonForms},
		{"parameter is a text", in("1e-15", `§"1e-15"`), "/law/parameters/prefactor", wrong, "is a text, must be a number"},
		{"parameter is a text NaN", in(": 5}", `: §"NaN"}`), "/law/parameters/stress exponent", wrong,
			"is a text, must be a number"},
		{"parameter is null", in("1e-15", `§null`), "/law/parameters/prefactor", wrong, "is null, must be a number"},
		{"parameter is true", in("1e-15", `§true`), "/law/parameters/prefactor", wrong, "is a truth value, must be a number"},
		{"parameter with a unit", in("1e-15", `§{"value": 1e-15, "unit": "1/h"}`), "/law/parameters/prefactor", wrong,
			"is an object, must be a number"},
		{"parameter is zero", in("1e-15", "§0"), "/law/parameters/prefactor", bad, "is 0, must be positive and finite"},
		{"parameter is negative", in(": 5}", ": §-5}"), "/law/parameters/stress exponent", bad,
			"is -5, must be positive and finite"},
		{"time exponent", withLaw(`{"kind": "Bailey-Norton", "parameters": {"prefactor": 1e-15, "stress exponent": 5,
    "time exponent": §1.5}}`), "/law/parameters/time exponent", bad, "is 1.5, must be above 0 and at most 1"},
		{"factor where there is no place for one", in(`"Norton",`, `"Norton", §"factor": 1,`), "/law/factor", unknown,
			`is not known here; known are "kind", "parameters"`},
		{"shares of more than everything", withLaw(`{"kind": "Kachanov-Rabotnov", "parameters": {` + damage + `
    "share of the greatest principal stress in the rupture stress": 0.7,
    "share of the mean stress in the rupture stress": §0.4}}`),
			"/law/parameters/share of the mean stress in the rupture stress", bad,
			"is 0.4, must be at least 0 and, with that of the greatest principal stress, at most 1"},
		{"reference stress of zero", withLaw(strings.Replace(`{"kind": "Kachanov-Rabotnov", "parameters": {`+damage+`
    "share of the greatest principal stress in the rupture stress": 0, "share of the mean stress in the rupture stress": 0}}`,
			`"reference stress": 100`, `"reference stress": §0`, 1)), "/law/parameters/reference stress", bad,
			"is 0, must be positive and finite"},
		{"unknown name in the other form", withLaw(`{"kind": "Norton", "parameters": {"rate": 1e-6, "stress": 100,
    §"exponent": 5}}`), "/law/parameters/exponent", unknown,
			`is not known here; known are "rate", "stress", "stress exponent"; or give "prefactor", "stress exponent"`},
		{"deep inside", deep(strings.Replace(norton, ": 5", ": §-5", 1)), "/law/law/laws/1/parameters/stress exponent", bad,
			"is -5, must be positive and finite"},
		{"below absolute zero", inCelsius(deepFactor(`{"kind": "Arrhenius", "parameters": {"activation energy": 3e5,
    "reference temperature": §-280}}`)), "/law/factor/parameters/reference temperature", bad,
			"is -280, in K -6.85, must be positive and finite"},
		{"numbers beyond a float64 in the units wanted, and no way round", withLaw(`§{"kind": "Anand", "parameters": {
    "initial resistance": 1, "activation energy": 1, "prefactor": 1, "stress multiplier": 1, "rate sensitivity": 1,
    "hardening": 1, "saturation coefficient": 1e308, "saturation exponent": 0, "hardening exponent": 1}}`), "/law",
			lawcard.NotConvertible, "cannot be put in Pa, s: its numbers leave the range of a float64"},
	}
}

func inCelsius(text string) string { return strings.Replace(text, `"K"`, `"degC"`, 1) }

// deepFactor is a law with a temperature factor.
func deepFactor(factor string) string {
	return withLaw(`{"kind": "with temperature", "law": ` + norton + `, "factor": ` + factor + `}`)
}

func brokenComposedLaws() []broken {
	const unknown, missing, wrong, bad = lawcard.Unknown, lawcard.Missing, lawcard.WrongType, lawcard.BadParameter
	return []broken{
		{"law is null", withLaw("§null"), "/law", wrong, "is null, must be an object"},
		{"sum of no laws", withLaw(`{"kind": "sum", "laws": §[]}`), "/law/laws", missing,
			"has too few entries: 0, must be at least 1"},
		{"sum without laws", withLaw(`§{"kind": "sum"}`), "/law", missing, `has no "laws"`},
		{"sum of an object", withLaw(`{"kind": "sum", "laws": §` + norton + `}`), "/law/laws", wrong,
			"is an object, must be an array"},
		{"sum of a number", withLaw(`{"kind": "sum", "laws": [` + norton + `, §5]}`), "/law/laws/1", wrong,
			"is a number, must be an object"},
		{"sum of damage", withLaw(`§{"kind": "sum", "laws": [{"kind": "Anand", "parameters": {
    "initial resistance": 1, "activation energy": 1, "prefactor": 1, "stress multiplier": 1, "rate sensitivity": 1,
    "hardening": 1, "saturation coefficient": 1, "saturation exponent": 0, "hardening exponent": 1}}]}`), "/law", bad, "is refused: creeplaw: sum of laws: a part has " +
			"an internal variable, deformation resistance, that would be lost"},
		{"unknown member of a sum", withLaw(`{"kind": "series", "laws": [` + norton + `], §"weights": [1]}`), "/law/weights",
			unknown, `is not known here; known are "kind", "laws"`},
		{"no factor", withLaw(`§{"kind": "with temperature", "law": ` + norton + `}`), "/law", missing, `has no "factor"`},
		{"kind of factor", deepFactor(`{"kind": §"arrhenius", "parameters": {"activation energy": 3e5}}`), "/law/factor/kind",
			unknown, `is "arrhenius", no kind of temperature factor known here; known are "table", "Arrhenius", ` +
				`"Arrhenius with two branches"`},
		{"a law for a factor", deepFactor(strings.Replace(norton, `"Norton"`, `§"Norton"`, 1)), "/law/factor/kind", unknown,
			`is "Norton", no kind of temperature factor known here; known are "table", "Arrhenius", "Arrhenius with two branches"`},
		{"activation energy", deepFactor(`{"kind": "Arrhenius", "parameters": {"activation energy": §-3e5}}`),
			"/law/factor/parameters/activation energy", bad, "is -300000, must be at least 0 and finite"},
		{"half of two branches", deepFactor(`{"kind": "Arrhenius with two branches", "parameters": §{
    "activation energy below": 6e4, "transition temperature": 263.15}}`), "/law/factor/parameters", missing,
			`has no "activation energy above"; or give "activation energy below", "activation energy above", ` +
				`"transition temperature", "prefactor below", "prefactor above"`},
		{"threshold", withLaw(`{"kind": "with threshold", "parameters": {"threshold stress": §-20}, "law": ` + norton + `}`),
			"/law/parameters/threshold stress", bad, "is -20, must be positive and finite"},
		{"no threshold", withLaw(`{"kind": "with threshold", "parameters": §{}, "law": ` + norton + `}`), "/law/parameters",
			missing, `has no "threshold stress"`},
		{"units within", withLaw(`{"kind": "in other units", "units": {"stress": "ksi", "time": §"hours"}, "law": ` + norton +
			`}`), "/law/units/time", lawcard.BadUnit, `is "hours", no unit of time known here; known are "s", "min", "h", "d", ` +
			`"a" and a size such as "1000 s"`},
		{"temperature in units within", withLaw(`{"kind": "in other units", "units": {"stress": "ksi", "time": "h",
    §"temperature": "degF"}, "law": ` + norton + `}`), "/law/units/temperature", unknown,
			`is not known here; known are "stress", "time"`},
	}
}

func brokenTables() []broken {
	const missing, wrong, bad = lawcard.Missing, lawcard.WrongType, lawcard.BadParameter
	table := func(rows string) string {
		return deepFactor(`{"kind": "table", "interpolated in": "1/T", "outside": "held", "rows": ` + rows + `}`)
	}
	tabulated := func(first, second string) string {
		return withLaw(`{"kind": "tabulated", "interpolated in": "T", "outside": "undefined", "rows": [
    {"temperature": ` + first + `, "law": ` + norton + `}, {"temperature": ` + second + `, "law": ` + norton + `}]}`)
	}
	return []broken{
		{"one row", table(`§[{"temperature": 800, "factor": 1}]`), "/law/factor/rows", missing,
			"has too few entries: 1, must be at least 2"},
		{"rows out of order", table(`[{"temperature": 800, "factor": 1}, {"temperature": §700, "factor": 2}]`),
			"/law/factor/rows/1/temperature", bad, "is 700, must be above the one before it"},
		{"rows of one temperature", tabulated("800", "§800"), "/law/rows/1/temperature", bad,
			"is 800, must be above the one before it"},
		{"temperature of zero", tabulated("§0", "800"), "/law/rows/0/temperature", bad, "is 0, must be positive and finite"},
		{"factor of zero", table(`[{"temperature": 700, "factor": 1}, {"temperature": 800, "factor": §0}]`),
			"/law/factor/rows/1/factor", bad, "is 0, must be positive and finite"},
		{"row without a factor", table(`[{"temperature": 700, "factor": 1}, §{"temperature": 800}]`), "/law/factor/rows/1",
			missing, `has no "factor"`},
		{"row of two numbers", table(`[§[700, 1], [800, 2]]`), "/law/factor/rows/0", wrong, "is an array, must be an object"},
		{"interpolation", strings.Replace(tabulated("700", "800"), `"T"`, `§"log T"`, 1), "/law/interpolated in",
			lawcard.Unknown, `is "log T", must be one of "1/T", "T"`},
		{"outside", strings.Replace(tabulated("700", "800"), `"undefined"`, `§"clamped"`, 1), "/law/outside", lawcard.Unknown,
			`is "clamped", must be one of "undefined", "held", "extrapolated"`},
		{"no choice made", strings.Replace(strings.Replace(tabulated("700", "800"), `"outside": "undefined", `, "", 1),
			`{"kind": "tabulated"`, `§{"kind": "tabulated"`, 1), "/law", missing, `has no "outside"`},
	}
}

func kindNames() string {
	return `"sum", "series", "with temperature", "with threshold", "tabulated", "in other units", "Omega", "strain-hardened curve", "Norton", ` +
		`"double power law", "Garofalo", "exponential of stress", "Soderberg", "power law with exponential", ` +
		`"diffusional creep", "Mukherjee-Bird-Dorn", "Darveaux-Banerji", "Bailey-Norton", "strain hardening", ` +
		`"Kachanov-Rabotnov", "Liu-Murakami", "Perrin-Hayhurst", "Kowalewski-Hayhurst-Dyson", "Omega polynomials", "Anand"`
}
