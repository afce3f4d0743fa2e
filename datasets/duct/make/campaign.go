package main

// The campaign in numbers, all invented. Arrays that the story rests on are
// constants, so that no test depends on how they were found.

// Conditions of the duct and the model.
const (
	chord    = 240.  // mm
	ramp     = 40.   // mm
	density  = 1.196 // kg/m³
	speed    = 31.   // m/s
	dynamic  = 574.7 // Pa, ½ρU²
	frontal  = 7.69  // planform area over frontal area
	thick    = 0.13  // thickness over chord
	fullSpan = 2500  // Pa, full scale of the pressure scanner
)

// Cells of the four grids.
var cells = [4]int{410000, 980000, 2350000, 5600000}

var (
	models = [2]string{"A", "B"}
	grids  = [4]string{"G1", "G2", "G3", "G4"}
)

// Values over the grids, G1 to G4. Those of C1 are at the angle of the test,
// α = 4.2°.
var (
	dragC1       = [2][4]float64{{.03412, .03287, .03217, .03178}, {.03155, .03068, .03021, .02995}}
	liftC1       = [2][4]float64{{.4312, .4391, .4346, .4371}, {.4203, .4165, .4145, .4134}}
	momentC1     = [2][4]float64{{-.0412, -.0421, -.0426, -.0429}, {-.0398, -.0404, -.0407, -.0409}}
	dragC2       = [2][4]float64{{.05710, .05484, .05360, .05022}, {.05124, .04986, .04911, .04870}}
	liftC2       = [2][4]float64{{.8934, .9012, .9055, .8871}, {.8702, .8747, .8771, .8784}}
	reattachment = [2][4]float64{{5.92, 6.18, 6.31, 6.38}, {5.41, 5.58, 5.67, 5.715}}
	frictionMin  = [2][4]float64{{-.00086, -.00097, -.00103, -.00106}, {-.00091, -.00098, -.00112, -.00139}}
	// wallDistance is y⁺ of the first cell of model A in case C2: the wall
	// treatment changes between G3 and G4.
	wallDistance = [2][4]float64{{38, 27, 12, .9}, {41, 29, 21, 15}}
)

// What the solvers exported first for C1, at α = 4.0°, and how the values move
// with the angle, from pairs of runs.
const (
	dragSlope = .0020 // of Cd, for 1°
	liftSlope = .10   // of Cl, for 1°
	angleLack = 0.2   // °, from 4.0° to 4.2°
	driftDrag = .03007
)

// Balance readings of C1, five runs over three days, and of C2.
var (
	balanceDrag   = [5]float64{.02951, .02968, .02958, .02983, .02940}
	balanceLift   = [5]float64{.4118, .4127, .4115, .4131, .4109}
	balanceMoment = [5]float64{-.0402, -.0405, -.0401, -.0404, -.0403}
	balanceDrag2  = [5]float64{.04792, .04821, .04806, .04833, .04798}
	balanceLift2  = [5]float64{.8701, .8722, .8695, .8718, .8709}
)

// Comparison errors of the two models at the 24 taps of the upper branch.
var (
	errorA = [24]float64{.0382, .0245, .0315, .0160, .0294, .0392, .0409, .0226, .0264, .0282, .0124, .0409, .0345, .0334, .0368, .0278, .0315, .0355, .0349, .0268, .0218, .0340, .0326, .0229}
	errorB = [24]float64{.0046, .0150, .0230, .0243, .0219, .0153, -.0045, -.0092, -.0216, -.0218, -.0114, -.0056, .0083, .0154, .0235, .0233, .0131, .0006, -.0058, -.0152, -.0275, -.0239, -.0092, .0047}
)

// Tracer concentration over that of the source at 36 ports in three rows of
// twelve, measured and of model A; the third row is where the model is poor.
var (
	tracerTest = [36]float64{
		.614, .344, .198, .119, .076, .052, .038, .030, .025, .022, .020, .019,
		.980, .540, .303, .175, .106, .068, .047, .035, .028, .024, .021, .019,
		.337, .196, .119, .077, .053, .040, .032, .027, .024, .021, .020, .019}
	tracerA = [36]float64{
		1.036, .386, .129, .100, .051, .059, .030, .020, .028, .025, .016, .021,
		.405, .437, .425, .216, .100, .068, .054, .064, .021, .036, .013, .016,
		.094, .076, .184, .108, .009, .042, .049, .060, .012, .010, .009, .021}
)
