package report

import (
	"bytes"
	"os"
	"testing"

	"linewitness/report/internal/reporttest"
)

func TestScratch(t *testing.T) {
	var b bytes.Buffer
	if err := WritePDF(&b, reporttest.Feeder(), Options{}); err != nil {
		t.Fatal(err)
	}
	_ = os.Stdout
}
