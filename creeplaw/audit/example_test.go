package audit_test

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/creeplaw/curve"
)

// A user's own law, with a slip of sign in its temperature and an exponential of stress. The numbers are invented.
func ExampleRun() {
	law := creeplaw.ValueFunc(func(p creeplaw.Point) float64 {
		return 1e-9 * math.Exp(p.Stress/40) * math.Exp(30e3*(1/p.Temperature-1/873.0))
	})
	report, err := audit.Run(law, audit.Domain{
		Stress:      audit.Range{Low: 20, High: 200},
		Strain:      audit.Range{Low: 1e-6, High: 0.05},
		Temperature: audit.Range{Low: 823, High: 873},
	}, audit.Settings{Units: creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, f := range report.Findings {
		if f.Severity == audit.Fault {
			fmt.Printf("%v at %.0f MPa, %.0f K\n", f.Kind, f.At.Stress, f.At.Temperature)
		}
	}
	// Output:
	// creep at zero stress at 0 MPa, 823 K
	// negative activation at 63 MPa, 823 K
}

// What an unloaded wait of a year does under time hardening and under strain hardening. The numbers are invented.
func ExampleRunClocked() {
	c, err := curve.NewBaileyNorton(1e-14, 5, 0.4)
	if err != nil {
		fmt.Println(err)
		return
	}
	clocked, _ := curve.NewTimeHardened(c) // both take any curve but nil, and this one starts
	hardened, _ := curve.NewStrainHardened(c)
	d := audit.Domain{
		Stress:      audit.Range{Low: 50, High: 200},
		Strain:      audit.Range{Low: 1e-6, High: 0.05},
		Temperature: audit.Range{Low: 823, High: 823},
		Time:        audit.Range{Low: 1, High: 8766},
	}
	settings := audit.Settings{Units: creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}}
	report, _ := audit.RunClocked(clocked, d, settings)
	f, _ := report.Find(audit.ClockDependence)
	for _, n := range f.Numbers[:2] {
		fmt.Printf("%s: %.2e\n", n.Name, n.Value)
	}
	report, _ = audit.Run(hardened, d, settings)
	_, found := report.Find(audit.ClockDependence)
	fmt.Println("strain hardening depends on the clock:", found)
	// Output:
	// creep strain of the second hold: 1.96e-04
	// the same after an unloaded wait: 1.60e-05
	// strain hardening depends on the clock: false
}
