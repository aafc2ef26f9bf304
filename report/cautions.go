package report

// cautions writes what a reader must know before touching the plant.
func (d *document) cautions() {
	d.b.Heading("Cautions", 170) // they stand together
	for _, c := range []struct{ term, text string }{
		{"RF burns", "Contact with a conductor at radio frequency burns deeply, often without a warning shock, and at levels far below those in this record. Switch off, isolate, lock out and earth before touching any conductor, the outer one included."},
		{"High voltage", "Standing waves and switching put voltages on lines, open ends and stubs that exceed the source's own; this record shows where. Long lines keep a charge after they are disconnected: discharge and earth them."},
		{"Exposure", "People near lines, aerials and open ends may be exposed beyond what is permitted. Observe the limits of IEEE Std C95.1, of the ICNIRP guidelines and of local law, whichever is strictest; this record does not compute exposure."},
		{"Breakdown, heating", "A rating that is exceeded even once can start an arc that the source then feeds. Ratings fall with altitude, humidity, dirt, age and temperature; keep the margins that the maker and the applicable code ask for."},
		{"Responsibility", "This record is calculation. It does not replace measurement on the finished plant, the local electrical and radio codes, or the judgement of a licensed practitioner; where they differ from it, they prevail."},
	} {
		d.b.Term(c.term, c.text)
	}
}
