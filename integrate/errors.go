package integrate

import "fmt"

// Code is the reason why an update was refused. It is an error that costs no allocation. Whatever the code, nothing has been
// written: result and start state are as they were. The zero Code is not a success and is never returned.
type Code uint8

// The codes of a failed update.
const (
	// BadIncrement: the increment holds a NaN or infinite strain, a time step that is negative, NaN or infinite, or a
	// temperature that is not positive and finite.
	// Usual cause: a diverged global iteration or an uninitialised temperature field.
	// What to do: mend the input; a smaller step does not help by itself. Explain names the quantity.
	BadIncrement Code = 1 + iota

	// BadState: the start state holds a NaN or infinite component, or a negative equivalent creep or plastic strain.
	// Usual cause: state storage that was not zeroed, or that was unpacked from the wrong place.
	// What to do: mend the storage. The zero State is virgin material. Explain names the quantity.
	BadState

	// OutsideTable: the temperature is outside the range of a tabulated property.
	// Usual cause: a temperature history in °C, or a table that ends too early.
	// What to do: extend the table or hold its ends with Table.Held. Explain names the property.
	OutsideTable

	// LawUndefined: the creep law returned NaN at a point the solution visits.
	// Usual cause: a law evaluated outside its domain, a prescribed stress that no finite creep strain satisfies, or a bug in a
	// user's own law.
	// What to do: a smaller step may stay inside the domain; Explain asks the law for its reason.
	LawUndefined

	// NoConvergence: the scalar solve did not meet its tolerance within its limit of iterations.
	// Usual cause: derivatives of a user's own law that contradict its values, or a law that jumps. It should never be seen
	// with the laws of package creeplaw.
	// What to do: run creeplaw/lawtest on the law; a smaller step may help.
	NoConvergence

	// BeyondRupture: a softening law has no solution at the end of the step that is connected to a vanishing step: rupture,
	// or an instability at fixed strain, lies within it.
	// Usual cause: tertiary creep near the end of life, an internal variable that reaches its limit, or a prescribed stress
	// above what the material can carry.
	// What to do: take a smaller step to approach rupture; stop when the smallest useful step still returns it. For a law with
	// internal variables Explain gives the time within the step at which the solution ends.
	BeyondRupture
)

var codeTexts = [...]string{
	BadIncrement:  "integrate: the increment has a value no material can be asked for",
	BadState:      "integrate: the start state has a value no material can be in",
	OutsideTable:  "integrate: the temperature is outside the range of a tabulated property",
	LawUndefined:  "integrate: the creep law is undefined at a point of the step",
	NoConvergence: "integrate: the scalar solve did not converge",
	BeyondRupture: "integrate: the step reaches beyond rupture",
}

func (c Code) Error() string {
	if int(c) < len(codeTexts) && codeTexts[c] != "" {
		return codeTexts[c]
	}
	return fmt.Sprintf("integrate: unknown code %d", uint8(c))
}

// Recoverable reports whether a smaller step from the same start state can help: true for LawUndefined, NoConvergence and
// BeyondRupture, also when wrapped; false for nil and for every other error.
func Recoverable(err error) bool {
	for err != nil {
		if c, ok := err.(Code); ok {
			return c == LawUndefined || c == NoConvergence || c == BeyondRupture
		}
		u, ok := err.(interface{ Unwrap() error })
		if !ok {
			return false
		}
		err = u.Unwrap()
	}
	return false
}

// MaterialError says that a material was asked for with a property it cannot have.
type MaterialError struct {
	Quantity    string  // such as "Poisson's ratio"
	Value       float64 // the value that was given
	Temperature float64 // where in a table [K], 0 for a constant
	Want        string  // what it must be
}

func (e *MaterialError) Error() string {
	at := ""
	if e.Temperature != 0 {
		at = fmt.Sprintf(" at %v K", e.Temperature)
	}
	return fmt.Sprintf("integrate: %s is %v%s, must be %s", e.Quantity, e.Value, at, e.Want)
}

// TableError says which row of a table over temperature is at fault.
type TableError struct {
	Row      int     // counted from 0
	Quantity string  // "temperature", "value" or "number of values"
	Value    float64 // what it was
	Want     string  // what it must be
}

func (e *TableError) Error() string {
	return fmt.Sprintf("integrate: table row %d: %s is %v, must be %s", e.Row, e.Quantity, e.Value, e.Want)
}

// UpdateError explains a Code: it names the quantity at fault and its value. errors.Is finds the Code in it.
type UpdateError struct {
	Code     Code
	Quantity string
	Value    float64
	Reason   error // the law's own explanation, nil if it has none
}

func (e *UpdateError) Error() string {
	text := fmt.Sprintf("%v: %s is %v", e.Code, e.Quantity, e.Value)
	if e.Reason != nil {
		text += ": " + e.Reason.Error()
	}
	return text
}

// Unwrap returns the Code.
func (e *UpdateError) Unwrap() error { return e.Code }
