package fsv

import "fmt"

// What the restatements of the method leave open, and what was chosen. The
// record states it: on a test pair five DC bins gave a GDM of 0.46, "fair", and
// four 0.30, "good"; the other choices count for less.
const (
	// dcBins is the number of bins of the DC part, from bin 0 on. The standard
	// as restated, the web page and the manual: the first four points. Sasse et
	// al. can be read as five.
	dcBins = 4

	// breakShare is the part of the sum over the bins above the DC part that
	// the bins up to the 40 % location hold. The sum is over one side of the
	// spectrum: the other mirrors it.
	breakShare = 0.4

	// sumOfSquares: some speak of the energy of the bins, but sum magnitudes.
	sumOfSquares = false

	// breakOffset is the number of bins from the 40 % location, the lower of
	// the two curves', up to the break-point.
	breakOffset = 5

	// windowHalfWidth is the number of bins on either side of the break-point
	// over which the window falls from 1 to 0. Some texts: 3.
	windowHalfWidth = 2

	// loSpan and hiSpan: the derivative of the low part is y(n+2) - y(n-2), the
	// first and the second of the high part are differences over three points
	// on either side, as Bongiorno and Mariscotti restate the standard. The
	// manual takes one point for both. At the ends of the curve the end point
	// stands for the points beyond it; the texts do not say.
	loSpan = 2
	hiSpan = 3

	// offsetTerm: the ADM has the term of the DC parts that the edition of 2008
	// added. Without it two curves that differ by a constant are the same.
	offsetTerm = true

	// mostPoints bounds the points compared, and so the cost. A longer curve
	// is interpolated to fewer points; what is too fast for them appears as
	// something slower, the same in both curves.
	mostPoints = 4096

	// leastPoints leaves five bins above the DC part. The texts give no bound:
	// common sense.
	leastPoints = 16

	// held is the part of the points that the grade and the spread hold.
	held = 0.85
)

// A method is a set of choices. The tests try others than the standard ones.
type method struct {
	dcBins, breakOffset, halfWidth, loSpan, hiSpan int
	breakShare                                     float64
	sumOfSquares, offsetTerm                       bool
	floor                                          float64 // see CurvesAbove
}

var chosen = method{
	dcBins: dcBins, breakOffset: breakOffset, halfWidth: windowHalfWidth, loSpan: loSpan, hiSpan: hiSpan,
	breakShare: breakShare, sumOfSquares: sumOfSquares, offsetTerm: offsetTerm,
}

// Choices says in sentences for the record what was chosen where the method,
// as it was known here, leaves a choice. What the method does not tell, and that
// its words are no limits, is for the record to say beside them.
func Choices() []string {
	return []string{
		fmt.Sprintf("Curves are compared over the range that they share, at evenly spaced points, no more than the coarser curve has there and at most %d, by linear interpolation.", mostPoints),
		fmt.Sprintf("The DC part is the bins 0 to %d of the Fourier transform.", dcBins-1),
		fmt.Sprintf("The break between the low and the high part lies %d bins above the bin at which the sum of the magnitudes (not of their squares) from bin %d on reaches %.0f %% of its total, in the curve where that bin is the lower; the window falls linearly over %d bins on either side.",
			breakOffset, dcBins, 100*breakShare, windowHalfWidth),
		fmt.Sprintf("Derivatives are differences over %d points on either side for the low part and over %d for the high part; at the ends of a curve its end point stands for those beyond.", loSpan, hiSpan),
		"The amplitude measure contains the offset term of the edition of 2008; the global measure is the mean over the points of the root of the sum of the squares, without weights.",
		fmt.Sprintf("The grade is the number of categories, from excellent on, that hold %.0f %% of the points; the spread is the length of the shortest run of categories around the fullest one that holds as many.", 100*held),
	}
}
