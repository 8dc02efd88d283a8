package main

// helpText is what -h prints above the flags.
const helpText = `bolt computes how the clamp load of a bolted flange joint at temperature falls over the years because the bolts creep,
and what retightening brings back.

usage: bolt [flags]

Without flags it runs the built-in example, examples/bolt/bolt.json and history.csv, whose data are invented.

THE HISTORY, a CSV file (comma-separated; lines that begin with # are comments). The first line names the columns, in any
order, each with its unit in brackets:
  time [h]         h or d; ascending. The first row is the assembly, where the nuts are tightened to the preload
  bolt [°C]        temperature of the bolts; °C, C or K
  flange [°C]      temperature of the flange; °C, C or K
  retighten [kN]   optional: clamp load of the whole joint to which the nuts are turned then (kN, or % of the preload); an
                   empty cell for none. A nut is never loosened: a load already above that is left alone
  remark           optional: text that is shown in the table
Temperatures are linear in time between the rows.

THE JOINT, a JSON file. Fields carry their units in their names:
  title, remarks                     text; a list of texts, which nothing reads
  expansion_reference_C or _K        temperature at which the parts fit without strain
  preload_kN, required_kN            clamp loads of the whole joint: after tightening, and the least the gasket needs
  bolts    count, thread_pitch_mm, poisson, law
           sections                  list of {name, length_mm, area_mm2}, in series over the clamped length
           young_MPa                 Young's modulus
           expansion_per_K           mean coefficient of thermal expansion from the reference temperature
  flange   stiffness_per_bolt_kN_per_mm, expansion_per_K
  gasket   optional: stiffness_per_bolt_kN_per_mm of an elastic layer
Young's modulus, Poisson's ratio, expansion and flange stiffness are a number or a table
  {"temperature_C": [20, 600], "value": [212e3, 162e3]}      (or temperature_K)
which is linear between its points and not extrapolated.

CREEP LAWS, by "kind", with stress in MPa, time in h, strain as a fraction, T in K; p is the creep strain reached:
  norton             rate = prefactor·σ^stress_exponent, or through one point: rate_per_h at stress_MPa, stress_exponent
  garofalo           rate = prefactor_per_h·sinh(stress_coefficient_per_MPa·σ)^exponent
  bailey-norton      curve = prefactor·σ^stress_exponent·t^time_exponent, or through one point: strain at stress_MPa after
                     time_h, stress_exponent, time_exponent. Used as strain hardening, so that no clock enters
  strain-hardening   rate = prefactor·σ^stress_exponent·p^strain_exponent, or rate_per_h at stress_MPa and strain,
                     stress_exponent, strain_exponent
  sum                laws: a list of laws whose rates add, such as primary and secondary creep
  arrhenius          law: any law, its rate times exp(-(Q/R)(1/T - 1/T0)); activation_energy_J_per_mol,
                     reference_temperature_C or _K

A mistake in a file is told with file, line and column; the exit status is then 2. It is 1 when the joint opens or the
computation or the pictures fail, and 0 otherwise.

` + caution + `

flags:
`

const caution = `This is a demonstration of a library, not a design tool. Bolted joints under pressure are designed and assessed to the
governing code by qualified engineers; published creep parameters are starting points, never design data.`
