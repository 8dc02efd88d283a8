// Package lawcard reads and writes creep laws as JSON: a card holds a law, plain or composed, with the units of its numbers,
// where they come from, how far they may be trusted, and the range that was tested.
//
//	{
//	  "format": "holdtime law card",
//	  "version": 1,
//	  "name": "demonstration steel",
//	  "source": "invented for this page",
//	  "status": "invented",
//	  "units": {"stress": "MPa", "time": "h", "temperature": "degC"},
//	  "tested range": {"stress": [60, 200], "temperature": [500, 600], "time": [100, 10000], "basis": "invented"},
//	  "law": {
//	    "kind": "with temperature",
//	    "factor": {"kind": "Arrhenius", "parameters": {"activation energy": 300000, "reference temperature": 550}},
//	    "law": {"kind": "Norton", "parameters": {"rate": 1e-6, "stress": 100, "stress exponent": 5}}
//	  }
//	}
//
// # The format
//
// Schema returns its JSON Schema (draft 2020-12), which lists every kind of law, temperature factor, curve and coefficient with
// its equation and the names of its parameters: those that the constructors of packages creeplaw and curve give them in
// their errors. Kinds that can be given in several forms, as Norton's law by a prefactor or by the rate at a stress, are told
// apart by the names. Laws nest to any depth up to MaxDepth.
//
// Units of stress and time are those named in package creeplaw, or a size such as "98066.5 Pa" or "7200 s". Temperatures are in
// K, degC or degF; a number per degree counts degrees of that size. Activation energies are in J/mol, lengths in m. A law
// tied to SI by Boltzmann's constant has its numbers in SI, and one of polynomials for ksi, h and °F in those, whatever the
// card declares; the schema says which.
//
// The version of the format is Version. A reader refuses any other, so that a number is never taken for what it is not.
//
// # Reading
//
// Read is strict. A name that is not known or is there twice, a parameter missing or too many, a unit that is none, a text
// where a number must be, a value that the law cannot have, anything after the card: each is a *CardError with the place as a
// JSON Pointer, line and column, and no card is returned. Only the first fault is reported.
//
// Units convert on reading to those the host asks for. Every number that a change of units alters is rounded once, or twice
// where degrees Fahrenheit come in, whatever its power of the unit. A card written in the units it was read in gives back the
// same law, to the bit.
//
// # Use
//
// Card.Check tells whether a point is in the tested range; a host asks it for the states it accepts. Card.Watch wraps the law so
// that an Observer is told of every evaluation outside. Neither changes a number. For an audit the intervals of the range
// are its domain:
//
//	audit.Domain{Stress: audit.Range(card.Tested.Stress), …}
//
// A card computes nothing and certifies nothing: parts under pressure or over people's heads are designed and assessed to the
// governing code by qualified engineers, and published parameters are starting points, never design data.
//
// Laws made of a user's own functions cannot be written. A user's own law that is creeplaw.Parametric can: see Kinds.
package lawcard
