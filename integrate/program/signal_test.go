package program_test

import (
	"bytes"
	"context"
	"encoding/csv"
	"fmt"
	"log"
	"math"
	"strconv"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/program"
)

func TestSignalsAreRefused(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for name, c := range map[string]struct {
		times, values []float64
		row           int
		quantity      string
	}{
		"empty":        {nil, nil, 0, "number of values"},
		"unequal":      {[]float64{0, 1}, []float64{1}, 1, "number of values"},
		"late start":   {[]float64{1, 2}, []float64{1, 2}, 0, "first time"},
		"disorder":     {[]float64{0, 2, 1}, []float64{1, 2, 3}, 2, "time"},
		"twice":        {[]float64{0, 1, 1}, []float64{1, 2, 3}, 2, "time"},
		"NaN time":     {[]float64{0, nan}, []float64{1, 2}, 1, "time"},
		"endless time": {[]float64{0, inf}, []float64{1, 2}, 1, "time"},
		"NaN value":    {[]float64{0, 1}, []float64{1, nan}, 1, "value"},
		"Inf value":    {[]float64{0, 1}, []float64{inf, 1}, 0, "value"},
	} {
		for _, make := range []func(_, _ []float64) (program.Signal, error){program.Linear, program.Held} {
			_, err := make(c.times, c.values)
			var e *program.SignalError
			require.ErrorAs(t, err, &e, name)
			require.Equal(t, c.row, e.Row, name)
			require.Equal(t, c.quantity, e.Quantity, name)
		}
	}
}

// TestSignalsDriveTheMaterial: without creep to speak of, the stress of a bar follows E times its strain signal, straight
// between points or in steps with a record at each jump.
func TestSignalsDriveTheMaterial(t *testing.T) {
	m := material(t, must(creeplaw.NewNortonAt(1e-30, 100, 3))(t))
	linear := must(program.Linear([]float64{0, 10, 20, 25}, []float64{0, 1e-3, -1e-3, 5e-4}))(t)
	held := must(program.Held([]float64{0, 10, 20}, []float64{2e-4, 1e-3, -1e-3}))(t)
	times := []float64{0, 5, 10, 12.5, 20, 24, 30}
	for _, c := range []struct {
		name   string
		signal program.Signal
		want   []float64
		jumps  int
	}{
		{"linear", linear, []float64{0, 5e-4, 1e-3, 5e-4, -1e-3, 2e-4, 5e-4}, 0},
		{"held", held, []float64{2e-4, 2e-4, 2e-4, 1e-3, 1e-3, -1e-3, -1e-3}, 3}, // a requested time sees what was
		{"ramp", program.Ramp(3e-4, -6e-4), []float64{3e-4, 1.5e-4, 0, -7.5e-5, -3e-4, -4.2e-4, -6e-4}, 1},
		{"constant", program.Constant(7e-4), []float64{7e-4, 7e-4, 7e-4, 7e-4, 7e-4, 7e-4, 7e-4}, 1},
	} {
		records, run := through(t, m, of(bar(c.name, c.signal, 30)),
			program.Options{Tolerance: integrate.Tolerance{Relative: 1e-6}, Times: times})
		require.NoError(t, run.Err(), c.name)
		jumps, asked := 0, 0
		for _, r := range records {
			switch r.Reason {
			case program.AtJump:
				jumps++
			case program.AtTime:
				require.Equal(t, times[asked], r.Time, c.name)
				if !(asked == 0 && r.Time == 0) { // the moment of the first jump
					check.Scaled(t, fmt.Sprintf("%s at %v", c.name, r.Time), r.Stress[0], young*c.want[asked], young*1e-3, 1e-12)
				}
				asked++
			}
		}
		require.Equal(t, len(times), asked, c.name)
		require.Equal(t, c.jumps, jumps, c.name)
	}
}

// TestCSVReadsBack: the table has a column for everything, in full precision.
func TestCSVReadsBack(t *testing.T) {
	m := material(t, must(creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6}))(t))
	o := program.Options{Tolerance: integrate.Tolerance{Relative: 1e-6}}
	records, run := through(t, m, of(tension("hold", 100, 700)), o)
	require.NoError(t, run.Err())
	var text bytes.Buffer
	again := program.Start(context.Background(), m, of(tension("hold", 100, 700)), o)
	require.NoError(t, program.WriteCSV(&text, again.Records(), m.Variables()))
	require.NoError(t, again.Err())
	rows, err := csv.NewReader(&text).ReadAll()
	require.NoError(t, err)
	require.Len(t, rows, len(records)+1)
	column := map[string]int{}
	for i, name := range rows[0] {
		column[name] = i
	}
	for i, r := range records {
		for name, want := range map[string]float64{"time": r.Time, "stress_xx": r.Stress[0], "strain_yy": r.Strain[1],
			"equivalent_creep": r.State.Equivalent, "damage": r.State.Internal[0], "dissipated": r.Dissipated} {
			got, err := strconv.ParseFloat(rows[i+1][column[name]], 64)
			require.NoError(t, err)
			require.Equal(t, want, got, name)
		}
	}
}

// A bar is pulled to 150 MPa, held for 100 h under that stress and then for 1000 h at the length it has reached.
func Example() {
	law, err := creeplaw.NewNorton(1e-16, 5) // MPa, h
	if err != nil {
		log.Fatal(err)
	}
	mat, err := integrate.New(integrate.NewIsotropic(150e3, 0.3), law, integrate.Options{})
	if err != nil {
		log.Fatal(err)
	}
	hot := program.Constant(823)
	p := program.Program{Temperature: 823, Blocks: []program.Block{{Segments: []program.Segment{
		{Name: "load", Duration: 1, Control: integrate.StressControl(), Prescribed: [6]program.Signal{program.Ramp(0, 150)},
			Temperature: hot},
		{Name: "creep", Duration: 100, Control: integrate.StressControl(), Prescribed: [6]program.Signal{program.Constant(150)},
			Temperature: hot},
		{Name: "relax", Duration: 1000, Control: integrate.UniaxialStress(), Prescribed: [6]program.Signal{program.Reached()},
			Temperature: hot},
	}}}}
	run := program.Start(context.Background(), mat, p, program.Options{
		Tolerance: integrate.Tolerance{Relative: 1e-5},
		Times:     []float64{1, 101, 201},
		TimesOnly: true,
		Events:    []program.Event{program.StressComponent(0, 75, program.Falling, false)},
	})
	for r := range run.Records() {
		fmt.Printf("%-7v %6.1f h: %5.1f MPa, strain %.5f\n", r.Reason, r.Time, r.Stress[0], r.Strain[0])
	}
	if err := run.Err(); err != nil {
		log.Fatal(err)
	}
	// Output:
	// start      0.0 h:   0.0 MPa, strain 0.00000
	// time       1.0 h: 150.0 MPa, strain 0.00100
	// time     101.0 h: 150.0 MPa, strain 0.00176
	// time     201.0 h: 105.8 MPa, strain 0.00176
	// event    594.8 h:  75.0 MPa, strain 0.00176
	// segment 1101.0 h:  63.4 MPa, strain 0.00176
}
