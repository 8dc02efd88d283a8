package lawcard

import (
	"reflect"
	"slices"

	"example.com/holdtime/creeplaw"
)

// Kinds are laws of the user's own that cards may hold besides those of this library: a name for the card and a specimen of
// the law, whatever its values. The specimen gives the names of the parameters, their units and WithParameters; a law is
// matched to it by Go type and names when a card is written. A nil Kinds adds nothing.
type Kinds map[string]creeplaw.Parametric

// kind is a kind of law made of numbers: its name and a specimen of each form its numbers can be given in.
type kind struct {
	name      string
	specimens []specimen

	// Laws with internal variables hold temperature factors: the names of the members, and how to take them off and put them on.
	factors []string
	strip   func(creeplaw.Law) (creeplaw.Law, []creeplaw.TemperatureFactor)
	dress   func(creeplaw.Law, []creeplaw.TemperatureFactor) (creeplaw.Law, error)
}

// specimen is a law of a kind, with numbers that do not matter.
type specimen struct {
	creeplaw.Parametric

	// point is the same law in the form about a stress of one unit, which a change of units cannot carry beyond the range of a
	// float64; nil where there is none.
	point func(values []float64) (creeplaw.Law, error)
}

// factorKind is a kind of temperature factor made of numbers.
type factorKind struct {
	name      string
	specimens []creeplaw.ParametricFactor
}

// kinds are those a reading knows.
type kinds struct {
	laws    []kind
	factors []factorKind
}

// known joins the user's kinds to those of the library.
func known(own Kinds) (kinds, error) {
	k := kinds{slices.Concat(steadyKinds(), hardeningKinds(), damageKinds()), factorKinds()}
	taken := composedKinds()
	for _, one := range k.laws {
		taken = append(taken, one.name)
	}
	names := make([]string, 0, len(own))
	for name := range own {
		names = append(names, name)
	}
	slices.Sort(names)
	for _, name := range names {
		switch law := own[name]; {
		case name == "":
			return k, &KindError{name, "has no name"}
		case slices.Contains(taken, name):
			return k, &KindError{name, "is a kind of this package already"}
		case law == nil || len(law.Parameters()) == 0:
			return k, &KindError{name, "has no parameters"}
		default:
			k.laws = append(k.laws, kind{name: name, specimens: []specimen{{law, nil}}})
		}
	}
	return k, nil
}

func names(ps []creeplaw.Parameter) []string {
	all := make([]string, len(ps))
	for i, p := range ps {
		all[i] = p.Name
	}
	return all
}

func valuesOf(ps []creeplaw.Parameter) []float64 {
	all := make([]float64, len(ps))
	for i, p := range ps {
		all[i] = p.Value
	}
	return all
}

// find returns the kind of a name.
func (k kinds) find(name string) (kind, bool) {
	i := slices.IndexFunc(k.laws, func(k kind) bool { return k.name == name })
	if i < 0 {
		return kind{}, false
	}
	return k.laws[i], true
}

// of returns the kind a law is of; first of the user's, which know their own.
func (k kinds) of(law creeplaw.Law) (kind, bool) {
	for _, one := range slices.Backward(k.laws) {
		bare := law
		if one.strip != nil && reflect.TypeOf(law) == reflect.TypeOf(one.specimens[0].Parametric) {
			bare, _ = one.strip(law)
		}
		for _, s := range one.specimens {
			if alike(s.Parametric, bare) {
				return one, true
			}
		}
	}
	return kind{}, false
}

// alike tells whether two laws, or two factors, are of one type and their parameters of the same names.
func alike(a interface{ Parameters() []creeplaw.Parameter }, b any) bool {
	p, ok := b.(interface{ Parameters() []creeplaw.Parameter })
	return ok && reflect.TypeOf(a) == reflect.TypeOf(b) && slices.Equal(names(a.Parameters()), names(p.Parameters()))
}

// nearest is the index of the form whose parameters differ least from those a card names; of two that differ alike it is the
// one that knows all those named.
func nearest(given []string, forms [][]string) int {
	best, least := 0, -1
	for i, form := range forms {
		unknown := missing(given, form)
		differences := 2*(missing(form, given)+unknown) + min(unknown, 1)
		if least < 0 || differences < least {
			best, least = i, differences
		}
	}
	return best
}

// missing counts the names that are in a and not in b.
func missing(a, b []string) int {
	n := 0
	for _, name := range a {
		if !slices.Contains(b, name) {
			n++
		}
	}
	return n
}

// must is for the specimens, whose numbers are good.
func must[T any](built T, err error) T {
	if err != nil {
		panic(err)
	}
	return built
}
