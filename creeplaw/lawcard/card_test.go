package lawcard_test

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/creeplaw/curve"
	"example.com/holdtime/creeplaw/lawcard"
)

func TestCheckNamesWhatIsOutside(t *testing.T) {
	c := card(steady()[0])
	inside := creeplaw.Point{Stress: 100, Strain: 0.001, Temperature: 800}
	assert.NoError(t, c.Check(inside))
	for _, x := range []struct {
		at        creeplaw.Point
		quantity  lawcard.Quantity
		value     float64
		low, high float64
		says      string
	}{
		{creeplaw.Point{Stress: 10, Strain: 0.001, Temperature: 800}, lawcard.Stress, 10, 13.7, 223.1,
			"lawcard: Norton: the stress 10 MPa is outside the tested range, 13.7 … 223.1"},
		{creeplaw.Point{Stress: 300, Strain: 0.001, Temperature: 800}, lawcard.Stress, 300, 13.7, 223.1,
			"lawcard: Norton: the stress 300 MPa is outside the tested range, 13.7 … 223.1"},
		{creeplaw.Point{Stress: 100, Strain: 0.02, Temperature: 800}, lawcard.Strain, 0.02, 0, 0.013,
			"lawcard: Norton: the creep strain 0.02 is outside the tested range, 0 … 0.013"},
		{creeplaw.Point{Stress: 100, Strain: 0.001, Temperature: 700}, lawcard.Temperature, 700, 701.3, 923.7,
			"lawcard: Norton: the temperature 700 K is outside the tested range, 701.3 … 923.7"},
		{creeplaw.Point{Stress: math.NaN(), Strain: 0.001, Temperature: 800}, lawcard.Stress, math.NaN(), 13.7, 223.1,
			"lawcard: Norton: the stress NaN MPa is outside the tested range, 13.7 … 223.1"},
	} {
		err := c.Check(x.at)
		var e *lawcard.RangeError
		if assert.True(t, errors.As(err, &e), "%+v: %v", x.at, err) {
			assert.Equal(t, [2]any{x.quantity, "Norton"}, [2]any{e.Quantity, e.Card})
			assert.Equal(t, [3]uint64{bits(x.value), bits(x.low), bits(x.high)}, [3]uint64{bits(e.Value), bits(e.Low), bits(e.High)})
			assert.EqualError(t, err, x.says)
		}
	}
	assert.NoError(t, c.CheckTime(0), "shorter than the shortest test")
	assert.NoError(t, c.CheckTime(10313))
	assert.EqualError(t, c.CheckTime(2e4), "lawcard: Norton: the time 20000 h is outside the tested range, 1 … 10313")
	assert.Error(t, c.CheckTime(math.NaN()))
	c.Tested = lawcard.Range{Basis: "nothing on record"}
	assert.NoError(t, c.Check(creeplaw.Point{Stress: 1e9, Strain: 9, Temperature: 1}))
	assert.NoError(t, c.CheckTime(1e9))
	assert.Error(t, c.Check(creeplaw.Point{Stress: math.NaN()}), "not a number is nowhere")
	assert.Error(t, c.CheckTime(math.NaN()))
}

// The bounds travel with the units: a point on a bound stays inside.
func TestRangeTravelsWithTheLaw(t *testing.T) {
	c := card(steady()[0])
	for _, u := range []creeplaw.Units{pascalSecond, {Stress: creeplaw.KilopoundPerSquareInch, Time: creeplaw.Year}, {Stress: 3, Time: 7}} {
		there, err := c.In(u)
		require.NoError(t, err)
		factor := float64(creeplaw.Megapascal / u.Stress)
		for _, stress := range []float64{13.7, 223.1} {
			assert.NoError(t, there.Check(creeplaw.Point{Stress: stress * factor, Strain: 0.001, Temperature: 800}), "%v", u)
		}
		assert.Error(t, there.Check(creeplaw.Point{Stress: 223.2 * factor, Strain: 0.001, Temperature: 800}), "%v", u)
		assert.NoError(t, there.CheckTime(10313*float64(creeplaw.Hour/u.Time)))
		assert.Error(t, there.CheckTime(10314*float64(creeplaw.Hour/u.Time)))
	}
}

// The intervals are the domain of an audit as they stand.
func TestRangeIsTheDomainOfAnAudit(t *testing.T) {
	r := card(steady()[0]).Tested
	d := audit.Domain{Stress: audit.Range(r.Stress), Strain: audit.Range(r.Strain), Temperature: audit.Range(r.Temperature),
		Time: audit.Range(r.Time)}
	assert.Equal(t, audit.Range{Low: 13.7, High: 223.1}, d.Stress)
}

func TestWhatCannotBeWritten(t *testing.T) {
	square := creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate { return creeplaw.Rate{Value: p.Stress * p.Stress} })
	norton := made(creeplaw.NewNorton(1e-15, 5))
	user := curve.Func(func(curve.Point) curve.Strain { return curve.Strain{} })
	change := func(f func(c *lawcard.Card)) lawcard.Card {
		c := card(steady()[0])
		f(&c)
		return c
	}
	law := func(l creeplaw.Law) lawcard.Card { return change(func(c *lawcard.Card) { c.Law = l }) }
	for _, x := range []struct {
		card  lawcard.Card
		path  string
		fault lawcard.Fault
		says  string
	}{
		{law(nil), "/law", lawcard.Unwritable, "is missing"},
		{law(square), "/law", lawcard.Unwritable, "is a creeplaw.RateFunc, which no kind of law describes"},
		{law(made(creeplaw.NewSum(norton, square))), "/law/laws/1", lawcard.Unwritable,
			"is a creeplaw.RateFunc, which no kind of law describes"},
		{law(made(creeplaw.WithTemperature(norton, doubling{}))), "/law/factor", lawcard.Unwritable,
			"is a lawcard_test.doubling, which no kind of temperature factor describes"},
		{law(creeplaw.Norton{}), "/law", lawcard.Unwritable, "is a creeplaw.Norton, which no kind of law describes"},
		{law(steadyLaw("dislocation")), "/law", lawcard.Unwritable,
			"is a law in Pa, s where the card is in MPa, h (see creeplaw.InUnits)"},
		{law(made(creeplaw.InUnits(norton, megapascalHour, pascalSecond))), "/law", lawcard.Unwritable,
			"is a law in Pa, s where the card is in MPa, h"},
		{law(made(curve.NewStrainHardened(user))), "/law/curve", lawcard.Unwritable,
			"is a curve.Func, which no kind of curve describes"},
		{law(made(curve.NewStrainHardened(made(curve.NewAndrade(curve.Constant(1), userCoefficient{}))))),
			"/law/curve/steady rate", lawcard.Unwritable,
			"is a lawcard_test.userCoefficient, which no kind of coefficient describes"},
		{change(func(c *lawcard.Card) { c.Name = "" }), "/name", lawcard.BadText, "is empty; it must say something"},
		{change(func(c *lawcard.Card) { c.Source = " " }), "/source", lawcard.BadText, "is empty; it must say something"},
		{change(func(c *lawcard.Card) { c.Status = "\xff" }), "/status", lawcard.BadText, "is not UTF-8"},
		{change(func(c *lawcard.Card) { c.Tested.Basis = "" }), "/tested range/basis", lawcard.BadText,
			"is empty; it must say something"},
		{change(func(c *lawcard.Card) { c.Units.Time = 0 }), "/units", lawcard.BadUnit, "are MPa, 0 s, must be positive and finite"},
		{change(func(c *lawcard.Card) { c.Tested.Stress.Low = 300 }), "/tested range/stress", lawcard.BadRange,
			"is from 300 to 223.1, must ascend from zero or more"},
		{change(func(c *lawcard.Card) { c.Tested.Time.High = math.Inf(1) }), "/tested range/time", lawcard.BadRange,
			"is from 1 to +Inf, must ascend from zero or more"},
		{change(func(c *lawcard.Card) { c.Tested.Strain.High = math.NaN() }), "/tested range/strain", lawcard.BadRange,
			"is from 0 to NaN, must ascend from zero or more"},
	} {
		var b strings.Builder
		err := lawcard.Write(&b, x.card)
		var e *lawcard.CardError
		if assert.True(t, errors.As(err, &e), "%s: %v", x.says, err) {
			assert.Equal(t, lawcard.CardError{Path: x.path, Fault: x.fault, Reason: x.says}, *e)
			assert.EqualError(t, err, "lawcard: "+x.path+" "+x.says)
		}
		assert.Empty(t, b.String(), "%s: nothing is written", x.says)
		_, err = x.card.In(pascalSecond)
		assert.ErrorAs(t, err, &e, x.says)
	}
}

// doubling and userCoefficient are a user's own, without the capability to name their parameters.
type doubling struct{}

func (doubling) LogFactor(t float64) (float64, float64) { return t * math.Ln2, t * math.Ln2 }

type userCoefficient struct{}

func (userCoefficient) LogAt(_, _ float64) curve.LogValue { return curve.LogValue{} }

// ownSinh is a user's own law, ṗ = A sinh(σ/σ₀), that names its parameters.
type ownSinh struct{ a, scale float64 }

func (l ownSinh) Rate(p creeplaw.Point) creeplaw.Rate {
	return creeplaw.Rate{Value: l.a * math.Sinh(p.Stress/l.scale), ByStress: l.a / l.scale * math.Cosh(p.Stress/l.scale)}
}

func (l ownSinh) Parameters() []creeplaw.Parameter {
	return []creeplaw.Parameter{
		{Name: "rate", Value: l.a, High: math.Inf(1), Dimension: creeplaw.Dimension{Time: -1}},
		{Name: "stress scale", Value: l.scale, High: math.Inf(1), Dimension: creeplaw.Dimension{Stress: 1}},
	}
}

func (l ownSinh) WithParameters(v []float64) (creeplaw.Law, error) {
	for i, p := range l.Parameters() {
		if !(v[i] > 0) {
			return nil, &creeplaw.ParameterError{Law: "own sinh", Parameter: p.Name, Value: v[i], Want: "positive"}
		}
	}
	return ownSinh{v[0], v[1]}, nil
}

func TestKindsOfTheUser(t *testing.T) {
	kinds := lawcard.Kinds{"my own sinh": ownSinh{1, 1}}
	law := made(creeplaw.NewSum(made(creeplaw.NewNorton(1.3e-15, 5)), ownSinh{1.7e-9, 23.3}))
	c := card(sample{"own", "", law})
	assert.Error(t, lawcard.Write(&strings.Builder{}, c), "without the kinds")
	var b strings.Builder
	require.NoError(t, kinds.Write(&b, c))
	_, err := lawcard.Read(strings.NewReader(b.String()), creeplaw.Units{})
	var e *lawcard.CardError
	require.ErrorAs(t, err, &e)
	assert.Equal(t, [2]any{"/law/laws/1/kind", lawcard.Unknown}, [2]any{e.Path, e.Fault})

	again, err := kinds.Read(strings.NewReader(b.String()), c.Units)
	require.NoError(t, err)
	assert.Equal(t, ownSinh{1.7e-9, 23.3}, again.Law.(creeplaw.Sum).Laws()[1])
	there, err := kinds.In(c, pascalSecond)
	require.NoError(t, err)
	assert.Equal(t, ownSinh{1.7e-9 / 3600, 23.3e6}, there.Law.(creeplaw.Sum).Laws()[1])

	_, err = kinds.Read(strings.NewReader(strings.Replace(b.String(), "23.3", "-23.3", 1)), c.Units)
	require.ErrorAs(t, err, &e)
	assert.Equal(t, "/law/laws/1/parameters/stress scale", e.Path)
	assert.Equal(t, "is -23.3, must be positive", e.Reason)

	for name, x := range map[string]struct {
		law  creeplaw.Parametric
		says string
	}{
		"":       {ownSinh{1, 1}, `lawcard: kind "" has no name`},
		"Norton": {ownSinh{1, 1}, `lawcard: kind "Norton" is a kind of this package already`},
		"sum":    {ownSinh{1, 1}, `lawcard: kind "sum" is a kind of this package already`},
		"none":   {nil, `lawcard: kind "none" has no parameters`},
		"bare":   {creeplaw.Norton{}, `lawcard: kind "bare" has no parameters`},
	} {
		bad := lawcard.Kinds{name: x.law}
		_, err := bad.Read(strings.NewReader(b.String()), c.Units)
		assert.EqualError(t, err, x.says)
		assert.EqualError(t, bad.Write(&b, c), x.says)
		_, err = bad.In(c, c.Units)
		assert.EqualError(t, err, x.says)
		var k *lawcard.KindError
		assert.ErrorAs(t, err, &k)
	}
}

// brittle reads and writes a little and then fails.
type brittle struct{ n int }

var errBrittle = fmt.Errorf("the disk is gone")

func (b *brittle) Read(p []byte) (int, error) {
	if b.n--; b.n < 0 {
		return 0, errBrittle
	}
	return copy(p, `{"format": `), nil
}

func (b *brittle) Write([]byte) (int, error) { return 0, errBrittle }

func TestErrorsOfReaderAndWriterComeBack(t *testing.T) {
	_, err := lawcard.Read(&brittle{2}, creeplaw.Units{})
	assert.Equal(t, errBrittle, err)
	assert.Equal(t, errBrittle, lawcard.Write(&brittle{}, card(steady()[0])))
}

func TestNamesOfFaultsAndQuantities(t *testing.T) {
	seen := map[string]bool{}
	for f := lawcard.BadSyntax; f <= lawcard.Unwritable; f++ {
		assert.False(t, seen[f.String()] || strings.HasPrefix(f.String(), "fault"), f.String())
		seen[f.String()] = true
	}
	assert.Equal(t, "fault 99", lawcard.Fault(99).String())
	assert.Equal(t, "fault 0", lawcard.Fault(0).String())
	assert.Equal(t, "stress creep strain temperature time", fmt.Sprint(lawcard.Stress, " ", lawcard.Strain, " ",
		lawcard.Temperature, " ", lawcard.Time))
	assert.EqualError(t, &lawcard.CardError{Reason: "is bad"}, "lawcard: the card is bad")
}
