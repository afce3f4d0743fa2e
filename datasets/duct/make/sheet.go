package main

// sheet writes the campaign sheet: what the two sides told each other in
// words. It is for reading; the demo states the same as constants.
func (d delivery) sheet() {
	d.text("campaign-sheet.txt", `Campaign OR-26, Orrowby 0.6 m closed-return duct. All of it is invented.

Model        Quillet strut fairing, chord 0.240 m, span 0.600 m, thickness 13 %, above a smooth floor ramp of height 0.040 m
Air          density 1.196 kg/m3, kinematic viscosity 1.52e-5 m2/s, speed 31.0 m/s, dynamic pressure 574.7 Pa, Re_c 4.89e5
Cases        C1 angle 4.2 deg (corrected; the simulations were run at 4.0), C2 angle 9 deg, C3 ramp only, with tracer
Models       A linear eddy-viscosity, two equations; B Reynolds-stress transport
Grids        G1 0.41, G2 0.98, G3 2.35, G4 5.60 million cells
Files        OR26_CASE_... are the laboratory's, CASE-MODEL-GRID-... the solvers'; *.mon are monitors, *.flux mass balances
Purpose      choose the setting of the fairing for a duct retrofit, to be used at 11 deg
Required     Cd within 5 %, x_r/H within 6 %, set by the decision owner on 14 September 2026, two days before the runs
Uncertainty  balance 0.000393 in Cd (standard, systematic); inputs 0.00025 in Cd, 0.06 in x_r/H (standard);
             reference pressure 0.020 in Cp (standard); scanner 0.25 % of full scale, 2500 Pa
`)
}
