// Package fsv compares two curves by feature selective validation, the method
// of IEEE Std 1597.1: how far they differ in amplitude (ADM), in features (FDM)
// and over all (GDM), point by point, as one value with a word, and as a
// histogram of six grades.
//
// Each curve is split by a discrete Fourier transform into a DC part, a low
// part Lo and a high part Hi. With the indices 1 and 2 for the curves, <> for
// the mean over the points and ' for a difference of neighbouring points,
//
//	ODM  = ||DC1| - |DC2|| / <|DC1| + |DC2|>
//	ADM  = ||Lo1| - |Lo2|| / <|Lo1| + |Lo2|> + ODM exp(ODM)
//	FDM1 = (|Lo1'| - |Lo2'|) / (2 <|Lo1'| + |Lo2'|>)
//	FDM2 = (|Hi1'| - |Hi2'|) / (6 <|Hi1'| + |Hi2'|>)
//	FDM3 = (|Hi1"| - |Hi2"|) / (7.2 <|Hi1"| + |Hi2"|>)
//	FDM  = 2 |FDM1 + FDM2 + FDM3|
//	GDM  = sqrt(ADM^2 + FDM^2)
//
// and the single values are the means over the points.
//
// # What it does not tell
//
// The method is blind to a sign reversal: y against -y is a perfect match. The
// words describe what a group of engineers would say of the two curves on
// paper; they are not limits of acceptance. Every measure is relative to the
// features that there are: of two flat lines with some noise it compares the
// noise. Result.Ripple tells how large the features are.
//
// Restatements of the method leave choices open, and a choice can move a word
// to the next one. The choices made here are the constants of this package;
// Choices puts them into sentences.
//
// # Sources
//
// The standard and the papers that introduced the method (Duffy et al. and
// Orlandi et al., IEEE Trans. EMC 48(3):449-467, 2006) were not read. The
// formulas are as restated in Bongiorno and Mariscotti, Electronics
// 11(16):2532, 2022, on the method's page at De Montfort University, in the
// manual of its developers' program for curves, in a paper by Sasse, Duffy and
// Orlandi (ARMMS) and in a talk by Di Febo (IBIS summit 2011).
package fsv
