package program

// Event is a limit that is watched for. Where its quantity passes the limit, the walk finds the time to rounding, ends a step
// there, makes a record AtEvent, and stops or goes on.
type Event struct {
	Name  string
	Of    func(Record) float64 // the quantity; it must be continuous within a segment and depend on nothing but the record
	Limit float64
	Way   Way
	Stop  bool // end the run there; Run.Err is nil then and Run.Stopped names the event
}

// Way is the direction in which a limit is passed.
type Way uint8

// The ways.
const (
	Either Way = iota
	Rising
	Falling
)

func (e *Event) wants(rising bool) bool {
	return e.Way == Either || (e.Way == Rising) == rising
}

// CreepStrain is the event of the equivalent creep strain reaching a limit [-].
func CreepStrain(limit float64, stop bool) Event {
	return Event{"creep strain", func(r Record) float64 { return r.State.Equivalent }, limit, Rising, stop}
}

// MisesStress is the event of the von Mises stress passing a limit [stress].
func MisesStress(limit float64, way Way, stop bool) Event {
	return Event{"von Mises stress", func(r Record) float64 { return r.Stress.Mises() }, limit, way, stop}
}

// StressComponent is the event of a component of the stress, by its index in tensor.Sym, passing a limit [stress].
func StressComponent(component int, limit float64, way Way, stop bool) Event {
	return Event{"stress " + componentNames[component], func(r Record) float64 { return r.Stress[component] }, limit, way, stop}
}

// InternalVariable is the event of an internal variable, by its index in Material.Variables, passing a limit, given as the
// deviation from its initial value: for damage, which starts at 0, the damage itself.
func InternalVariable(index int, name string, limit float64, stop bool) Event {
	return Event{name, func(r Record) float64 { return r.State.Internal[index] }, limit, Either, stop}
}
