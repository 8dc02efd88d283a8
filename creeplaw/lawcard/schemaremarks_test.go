package lawcard

// remarks say in the schema what each kind is: the equation, with the unit of what is not plain. Symbols as in the
// documentation of packages creeplaw and curve.
func remarks() map[string]string {
	return map[string]string{
		sumKind:       "The rates of the laws add: mechanisms side by side.",
		seriesKind:    "The reciprocals of the rates add: mechanisms in sequence.",
		thermalKind:   "A law (or a coefficient) times a factor of temperature.",
		thresholdKind: "A law that sees the stress above a threshold [stress].",
		tabulatedKind: "A law at each of several temperatures; between them the logarithm of the rate is interpolated linearly in 1/T or T.",
		unitsKind: "A law whose numbers stay in units of its own, whatever those of the card. Temperatures are in that of the " +
			"card.",
		omegaKind:    "rate = initial rate × exp(Ω × creep strain): coefficient of acceleration Ω.",
		hardenedKind: "The law that a curve of creep strain over time becomes when history enters through the creep strain.",
		tableKind:    "A factor at each of several temperatures; between them its logarithm is interpolated linearly in 1/T or T.",
		"Norton":     "A σⁿ: prefactor A [stress⁻ⁿ/time]; or rate [1/time] × (σ/stress)ⁿ.",
		"double power law": "A₁ σⁿ¹ + A₂ σⁿ²: prefactors [stress⁻ⁿ/time]; or rate [1/time] that each term gives at the transition " +
			"stress.",
		"Garofalo":                   "A sinhⁿ(Bσ): prefactor A [1/time], stress coefficient B [1/stress], exponent n.",
		"exponential of stress":      "A exp(σ/σ₀): prefactor A [1/time], stress scale σ₀. Creeps under no stress.",
		"power law with exponential": "A σⁿ exp(σ/σ₀): prefactor A [stress⁻ⁿ/time], stress scale σ₀.",
		"diffusional creep": "Diffusion through the lattice (Nabarro-Herring) and along grain boundaries (Coble), or one of them. All " +
			"numbers in SI units, whatever those of the card: atomic volume [m³], grain size [m], lattice diffusivity [m²/s], boundary " +
			"diffusivity times width [m³/s].",
		"Mukherjee-Bird-Dorn": "Dislocation creep with modulus and diffusivity written out. All numbers in SI units, whatever those of " +
			"the card: shear modulus [Pa], its slope [Pa/K], Burgers vector [m], lattice diffusivity [m²/s], core diffusivity times " +
			"cross-section [m⁴/s], grain size [m].",
		"Darveaux-Banerji": "A μ(T)/T sinhⁿ[σ/s(T)] exp(-Q/RT): modulus μ in any unit, prefactor A for it [K/(unit of μ · time)], " +
			"stress scale s.",
		"Bailey-Norton": "The law of the curve A σⁿ tᵐ in its closed form (or the curve): prefactor A [stress⁻ⁿ time⁻ᵐ]; or creep " +
			"strain × (σ/stress)ⁿ (t/time)ᵐ.",
		"strain hardening": "A σⁿ pᵏ: prefactor A [stress⁻ⁿ/time], strain exponent k ≤ 0; or rate [1/time] × (σ/stress)ⁿ " +
			"(p/strain)ᵏ.",
		"Kachanov-Rabotnov": "Creep with one damage variable; prefactors [stress^-exponent/time], or [1/time] at the reference stress.",
		"Liu-Murakami":      "Creep with one damage variable; prefactors [stress^-exponent/time], or [1/time] at the reference stress.",
		"Perrin-Hayhurst": "Hyperbolic sine with hardening [stress], ageing [1/time] and cavitation; zeros for what there is none of, " +
			"a cavitation at rupture of 0 is 1.",
		"Kowalewski-Hayhurst-Dyson": "Hyperbolic sine with hardening [stress], ageing [1/time] and cavitation; zeros for what there is " +
			"none of, a cavitation at rupture of 0 is 1.",
		"Omega polynomials": "Initial rate and Omega as polynomials of log₁₀ stress over temperature, in ksi, h and °F whatever the " +
			"units of the card; but the temperatures of the range in that of the card.",
		"Anand":                        "Unified creep and plasticity with one deformation resistance: resistance, hardening and saturation coefficient [stress].",
		"Arrhenius":                    "exp(-Q/RT), or one at a reference temperature: activation energy Q [J/mol].",
		"Arrhenius with two branches":  "Two activation energies [J/mol] and where they meet; continuous there, or with prefactors.",
		"primary and secondary powers": "A σⁿ tᵐ + B σᵏ t.",
		"Graham-Walles": "Terms A σⁿ tᵐ exp(-Q/RT), each with or without activation energy [J/mol] and reference " +
			"temperature.",
		"Andrade":              "β t^(1/3) + κ t: cube-root coefficient β [time^(-1/3)], steady rate κ [1/time].",
		"logarithmic creep":    "α ln(1 + γt): strain α, rate constant γ [1/time].",
		"McVetty":              "G (1 - e^(-qt)) + ṡ t: transient strain G, decay constant q [1/time], steady rate ṡ [1/time].",
		"Garofalo's transient": "εₜ (1 - e^(-rt)) + ṡ t.",
		"Blackburn":            "εₓ (1 - e^(-st)) + εₜ (1 - e^(-rt)) + ṡ t.",
		"Findley":              "m′ sinh(σ/σₘ) tⁿ: creep m′ [time⁻ⁿ]; with or without an instantaneous strain ε₀′ sinh(σ/σₑ), which is not creep.",
		"two regimes": "c tᵐ until the end of primary creep [time], then steady creep; without an end it is where the rates are " +
			"equal.",
		"theta projection":  "θ₁ (1 - e^(-θ₂t)) + θ₃ (e^(θ₄t) - 1): primary strain θ₁ and rate constant θ₂, tertiary θ₃ and θ₄.",
		"sum of terms":      "Any number of terms: c tᵐ, c (1 - e^(-rt)), c (e^(rt) - 1), c ln(1 + rt) or c rt/(1 + rt).",
		"power":             "A σⁿ: prefactor in the unit of the coefficient × stress⁻ⁿ; or value × (σ/stress)ⁿ.",
		"inverse power":     "A σ⁻ⁿ: prefactor in the unit of the coefficient × stressⁿ.",
		"hyperbolic sine":   "A sinhⁿ(Bσ): prefactor in the unit of the coefficient, stress coefficient B [1/stress].",
		"exponential":       "A exp(Bσ): stress coefficient B [1/stress]. Not zero at zero stress.",
		"Soderberg":         "A [exp(Bσ) - 1], stress coefficient B [1/stress]; as a law A [exp(σ/σ₀) - 1], stress scale σ₀, A [1/time].",
		bilinearKind:        "exp(a + bσ + cT + dσT), T in K. The card must be in K.",
		rateKind:            "The rate of a law of steady creep, as a coefficient [1/time].",
		productKind:         "The product of coefficients.",
		"constant":          "A number, in the unit of the coefficient.",
		powerTerm:           "c tᵐ.",
		"saturating":        "c (1 - e^(-rt)).",
		"growing":           "c (e^(rt) - 1).",
		"logarithm of time": "c ln(1 + rt).",
		"hyperbolic":        "c rt/(1 + rt).",
	}
}

const powerTerm = "power of time"
