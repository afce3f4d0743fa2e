package uncertainty

// FewReadings holds how often a stated 95 % interval of a mean of two or three
// readings with a common error beside them holds the true value: effective
// degrees of freedom overstate what so few readings tell. Common is the
// standard uncertainty of the common error over the deviation of one reading.
// Measured in 10,000 seeded trials by the test of this package.
var FewReadings = []struct {
	Readings       int
	Common, Covers float64
}{
	{2, 0, 0.95},
	{2, 0.3, 0.88},
	{3, 0, 0.95},
	{3, 0.3, 0.93},
}
