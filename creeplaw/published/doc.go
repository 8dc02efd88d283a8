// Package published holds creep parameter sets from the open literature, ready to use as laws, each with its citation, its
// units, the range it is known for and how well its numbers are known.
//
// A set is a starting point, not design data. It describes the batch, the tests and the fit of its authors; another heat of
// the same grade may creep several times faster or slower. Parts under pressure or over people's heads are designed and
// assessed to the governing code by qualified engineers, with that code's data.
//
// # How well the numbers are known
//
// Status says it: Verified numbers were read in a retrieved text. All others were typed from memory, with the confidence
// stated, checked here only for the size of the rates they give, and should be looked up in the source before use.
//
// # Units
//
// Each law is in the units of its source (Record.Units), so that its parameters can be compared with it; Set.In gives it in
// others. Temperatures are in K. Rates are strains, not per cent, and equivalent: rates published for shear or for the second
// invariant are converted here, and the constructor says how.
//
// # Left out
//
// Not here, because a constant is missing or is not known well enough to print:
//
//   - 1Cr-Mo-V, the low-alloy steel of Frost and Ashby: its prefactor A is not at hand. AlphaIron is the pure metal only.
//   - BGRb for rock salt: the prefactor of its first term is in doubt by a factor of ten.
//   - The transient of Munson and Dawson, and their argillaceous salt; the basal-slip and diffusion terms of Goldsby and
//     Kohlstedt; the polynomial of Colbeck and Evans.
//   - 2.25Cr-1Mo after Booker, cold-worked 316, 316L(N): equations known, constants not.
package published
