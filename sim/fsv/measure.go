package fsv

// A Measure is a difference measure: point by point, and what is made of it.
type Measure struct {
	Points             []float64  // along the curves, 0 where they match
	Value              float64    // mean of the Points
	Word               string     // for Value, "excellent" to "very poor"
	Histogram          [6]float64 // part of the points in each category, from excellent on
	Grade              int        // number of categories from excellent on that hold 85 % of the points
	Spread             int        // length of the shortest run around the fullest category that does
	ConfidenceWeighted float64    // mean of the numbers of the points' categories, 1 to 6
}

// words are the categories, from the best. Values below bounds[i] are in
// category i; the last bound itself is in the category before it.
var (
	words  = [6]string{"excellent", "very good", "good", "fair", "poor", "very poor"}
	bounds = [5]float64{0.1, 0.2, 0.4, 0.8, 1.6}
)

// Word is the word for a value of a difference measure:
//
//	below 0.1  excellent      0.4 to 0.8  fair
//	0.1 to 0.2 very good      0.8 to 1.6  poor
//	0.2 to 0.4 good           above 1.6   very poor
func Word(value float64) string { return words[category(value)] }

func category(value float64) int {
	for i, b := range bounds {
		if value < b || value == b && i == len(bounds)-1 {
			return i
		}
	}
	return len(bounds)
}

// Visual turns a value of a difference measure into the scale from 1
// (excellent) to 6 (very poor) on which observers were asked for their
// opinion. The manual's formula, which jumps by a hundredth at the bounds.
func Visual(value float64) float64 {
	if value <= bounds[0] {
		return 1 + 10*value
	}
	for i, slope := range [...]float64{10, 5, 2.5, 1.25} {
		if value <= bounds[i+1] {
			return float64(i+2) + slope*(value-(bounds[i]-0.001))
		}
	}
	return 6
}

// newMeasure fills in what the points tell.
func newMeasure(points []float64) Measure {
	m := Measure{Points: points, Value: mean(points), Word: Word(mean(points))}
	var count [6]int
	for _, p := range points {
		count[category(p)]++
	}
	for i, c := range count {
		m.Histogram[i] = float64(c) / float64(len(points))
		m.ConfidenceWeighted += float64(i+1) * m.Histogram[i]
	}
	m.Grade, m.Spread = grade(m.Histogram), spread(m.Histogram)
	return m
}

// heldRounding is what the sum of six fractions may lose.
const heldRounding = 1e-12

// grade is the number of categories, from the best, that hold 85 % of the
// points.
func grade(histogram [6]float64) int {
	n := 1
	for sum := histogram[0]; n < len(histogram) && sum < held-heldRounding; n++ {
		sum += histogram[n]
	}
	return n
}

// spread is the length of the shortest run of neighbouring categories that
// contains the fullest one, or one of the fullest, and 85 % of the points.
func spread(histogram [6]float64) int {
	fullest := 0.0
	for _, h := range histogram {
		fullest = max(fullest, h)
	}
	shortest := len(histogram)
	for from := range histogram {
		sum, full := 0.0, false
		for to := from; to < len(histogram); to++ {
			sum += histogram[to]
			full = full || histogram[to] == fullest
			if full && sum >= held-heldRounding {
				shortest = min(shortest, to-from+1)
				break
			}
		}
	}
	return shortest
}

func mean(x []float64) float64 {
	sum := 0.0
	for _, v := range x {
		sum += v
	}
	return sum / float64(len(x))
}
