package integrate

import "math"

// surface is the yield surface a step meets: the hardening curve at the end temperature, from the plastic strain at the start.
type surface struct {
	curve
	start   float64 // κ₀: plastic strain at the start
	yield0  float64 // σy(κ₀)
	slope0  float64 // dσy/dκ there
	rest    float64 // Q exp(-b κ₀): the saturation that is left
	elastic float64 // 3G
}

func (m *plasticity) surface(old *State, temperature, shear float64) surface {
	s := surface{curve: m.hardening.at(temperature), start: old.EquivalentPlastic, elastic: 3 * shear}
	s.yield0, s.slope0, _ = s.stress(s.start)
	if s.saturation > 0 {
		s.rest = s.saturation * math.Exp(-s.rate*s.start)
	}
	return s
}

// met is where a loading line meets the yield surface.
type met struct {
	strain float64 // Δκ
	stress float64 // σy(κ₀+Δκ)
	share  float64 // k = H/(3G+H), the part of a strain increment on the surface that becomes stress when nothing creeps
}

func (s *surface) shareOf(slope float64) float64 { return slope / (s.elastic + slope) }

// meet solves a σy(κ₀+Δκ) + 3G Δκ = load for Δκ >= 0, a > 0. The left side rises with Δκ, so that there is one solution, or
// none but Δκ = 0 if the load is below a σy(κ₀).
func (s *surface) meet(a, load float64) met {
	excess := load - a*s.yield0
	if !(excess > 0) {
		return met{0, s.yield0, s.shareOf(s.slope0)}
	}
	if s.table != nil {
		return s.meetTable(a, load, excess)
	}
	straight := s.elastic + a*s.modulus
	if !(s.rest*s.rate > 0) {
		strain := excess / straight
		return met{strain, s.yield0 + s.modulus*strain, s.shareOf(s.modulus)}
	}
	x := saturate(a*s.rest*s.rate/straight, s.rate*excess/straight)
	strain := x / s.rate
	stress := s.yield0 + s.modulus*strain - s.rest*math.Expm1(-x)
	return met{strain, stress, s.shareOf(s.modulus + s.rate*s.rest*math.Exp(-x))}
}

func (s *surface) meetTable(a, load, excess float64) met {
	i := s.segment(s.start)
	l := s.line(i)
	from, value := s.start, s.yield0
	for {
		behind := from - s.start
		part := (excess - s.elastic*behind) / (s.elastic + a*l.slope)
		if !(from+part >= l.to) {
			return met{behind + part, value + l.slope*part, s.shareOf(l.slope)}
		}
		i++
		l = s.line(i)
		from, value = l.from, l.value
		excess = load - a*value
	}
}

// saturate solves x + A (1 - e⁻ˣ) = B for x, A and B > 0. The left side is concave, so that Newton's iteration rises to the
// root from any bound below it. Bounds are B/(1+A) and B-A, and for a large A those of the equation in logarithms,
// x = ln A - ln(A-B+x), which turns a bound on one side into one on the other.
func saturate(a, b float64) float64 {
	const most = 60
	x := math.Max(b/(1+a), b-a)
	if a > 1 && a-b+x > 0 {
		above := math.Min(b, math.Log(a/(a-b+x)))
		x = math.Max(x, math.Log(a/(a-b+above)))
	}
	for range most {
		gone := a * math.Expm1(-x)
		rest := a + gone // good enough for a slope
		step := (b - x + gone) / (1 + rest)
		x += step
		if !(step > 2*epsilon*(x+b/(1+rest))) {
			break
		}
	}
	return x
}
