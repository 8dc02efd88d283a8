package audit

import "fmt"

// Severity says how much a finding weighs.
type Severity int

const (
	// Remark is worth knowing and asks for nothing.
	Remark Severity = 1 + iota
	// Warning is sound within limits that somebody must watch, and wants a reason in the report that uses the law.
	Warning
	// Fault is a law that should not go into a calculation over this domain as it stands.
	Fault
)

// String is "remark", "warning" or "fault".
func (s Severity) String() string {
	switch s {
	case Remark:
		return "remark"
	case Warning:
		return "warning"
	case Fault:
		return "fault"
	}
	return fmt.Sprintf("severity %d", int(s))
}

// Kind is what a finding is about. Each has its own constant, so that a program can look for it.
type Kind int

// The kinds of findings, with the severity each has.
const (
	// Panics: the law panicked. Fault.
	Panics Kind = 1 + iota
	// NotRepeatable: the same input gave other bits. Fault; nothing else is examined.
	NotRepeatable
	// BadVariables: too many internal variables, or one without a usable initial value. Fault.
	BadVariables
	// CreepAtZeroStress: the rate at no stress, or its limit there, is not zero. Fault.
	CreepAtZeroStress
	// UndefinedAtZeroStress: the rate at no stress is not a number. Fault.
	UndefinedAtZeroStress
	// NegativeRate: an equivalent rate below zero. Fault.
	NegativeRate
	// NotFinite: NaN or Inf inside the domain. Fault; Warning where only the plain rate leaves the range of a float64.
	NotFinite
	// FallsWithStress: more stress, less creep. Fault.
	FallsWithStress
	// LogContradictsRate: LogRate is not the logarithm of Rate. Fault.
	LogContradictsRate
	// EvolutionContradictsRate: Evolve with the initial variables, in tension, is not Rate. Fault.
	EvolutionContradictsRate
	// WrongDerivative: a partial derivative is not the slope of the values. Fault; Warning below one part in a thousand.
	WrongDerivative
	// WrongLogDerivative: the same of LogRate, or of the logarithmic derivatives of Evolve.
	WrongLogDerivative
	// UndeclaredPrincipal: the greatest principal stress is used though the law says it does not see it. Fault.
	UndeclaredPrincipal
	// ClockDependence: an unloaded wait changes the creep that follows. Fault for a clock; Warning for an internal variable
	// that changes without load; Remark for a clock that changes nothing.
	ClockDependence
	// RateJump: the rate is discontinuous. Fault; a Warning below a tenth where temperature is crossed.
	RateJump
	// NeverStarts: no rate at zero creep strain and some above it, so that virgin material stays as it is. Fault.
	NeverStarts
	// UndefinedAtZeroStrain: the rate of virgin material is not a number, or not the limit of the rates near it. Fault.
	UndefinedAtZeroStrain
	// NegativeActivation: creep slows down on heating. Fault.
	NegativeActivation
	// NoTemperature: no dependence on temperature over a range where there must be one. Warning.
	NoTemperature
	// UnusualActivation: an apparent activation energy out of the bounds of common practice. Warning.
	UnusualActivation
	// Softening: the rate grows with creep strain, or with the internal variables that follow it. Warning.
	Softening
	// UndefinedBeyond: no number at ten times the highest or a tenth of the lowest stress. Warning.
	UndefinedBeyond
	// ExplodesBeyond: at ten times the stress the rate is far above the power law that the domain ends with. Warning.
	ExplodesBeyond
	// StallsBeyond: at ten times the stress the rate is far below it, or hardly rises any more. Warning.
	StallsBeyond
	// AcceptsNaN: a NaN stress gives a number. Warning.
	AcceptsNaN
	// ExponentChanges: the local stress exponent beyond the domain is another one than at its ends. Remark.
	ExponentChanges
	// SlopeJump: the rate is continuous but has a corner. Remark.
	SlopeJump
	// NoCreep: the rate is zero under stress in a part of the domain. Remark.
	NoCreep
	// VariableRecovers: a variable with a limit moves away from it, as a resistance that hardens or damage that heals. Remark.
	VariableRecovers
	// InfiniteStart: the rate of virgin material is infinite. Remark.
	InfiniteStart
)

var kindNames = [...]string{
	Panics:                   "panics",
	NotRepeatable:            "not repeatable",
	BadVariables:             "bad variables",
	CreepAtZeroStress:        "creep at zero stress",
	UndefinedAtZeroStress:    "undefined at zero stress",
	NegativeRate:             "negative rate",
	NotFinite:                "not finite",
	FallsWithStress:          "falls with stress",
	LogContradictsRate:       "logarithm contradicts rate",
	EvolutionContradictsRate: "evolution contradicts rate",
	WrongDerivative:          "wrong derivative",
	WrongLogDerivative:       "wrong logarithmic derivative",
	UndeclaredPrincipal:      "undeclared principal stress",
	ClockDependence:          "clock dependence",
	RateJump:                 "jump of the rate",
	NeverStarts:              "never starts",
	UndefinedAtZeroStrain:    "undefined at zero strain",
	NegativeActivation:       "negative activation",
	NoTemperature:            "no temperature dependence",
	UnusualActivation:        "unusual activation",
	Softening:                "softening",
	VariableRecovers:         "variable recovers",
	UndefinedBeyond:          "undefined beyond the domain",
	ExplodesBeyond:           "explodes beyond the domain",
	StallsBeyond:             "stalls beyond the domain",
	AcceptsNaN:               "accepts NaN",
	ExponentChanges:          "exponent changes",
	SlopeJump:                "corner of the rate",
	NoCreep:                  "no creep under stress",
	InfiniteStart:            "infinite initial rate",
}

// String is the kind in words, such as "creep at zero stress".
func (k Kind) String() string {
	if k > 0 && int(k) < len(kindNames) {
		return kindNames[k]
	}
	return fmt.Sprintf("kind %d", int(k))
}

// Kinds returns every kind, in the order in which a report lists those of one severity.
func Kinds() []Kind {
	all := make([]Kind, 0, len(kindNames)-1)
	for k := Panics; int(k) < len(kindNames); k++ {
		all = append(all, k)
	}
	return all
}
