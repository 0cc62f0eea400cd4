package form_test

import (
	"bytes"
	"context"
	"io"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"dropcrest/ui/answer"
	"dropcrest/ui/form"
	"dropcrest/ui/scenario"
)

// calibrated is the Counter question asked about these files.
func calibrated(t *testing.T, files ...string) form.Sheet {
	t.Helper()
	questions := answer.Questions()
	q := questions[slices.IndexFunc(questions, func(q answer.Question) bool { return q.Key == "counter" })]
	s := scenario.Default()
	s.Bootstrap, s.Scans = 50, nil
	for _, name := range files {
		s.Scans = append(s.Scans, scenario.DataFile{Name: name})
	}
	env := answer.Env{Demo: os.DirFS("../../testdata/demo"), Version: "9.9", Open: func(name string) (io.ReadCloser, error) { return os.Open(name) }}
	a, err := q.Ask(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	return form.Sheet{Question: q, Scenario: s, Answer: a, Version: "9.9", Width: 80}
}

// The record of a calibration is one page of A4 at most, the points on it where they
// have room.
func TestRecordIsOnePage(t *testing.T) {
	text, err := os.ReadFile("../../testdata/demo/scans.csv")
	if err != nil {
		t.Fatal(err)
	}
	// The same scans again, half a kelvin further up.
	shifted := regexp.MustCompile(`sulfate,(\d+)\.(\d+)`).ReplaceAllFunc(text, func(cell []byte) []byte {
		number, _ := strconv.ParseFloat(strings.TrimPrefix(string(cell), "sulfate,"), 64)
		return strconv.AppendFloat([]byte("sulfate,"), number+0.5, 'f', 3, 64)
	})
	more := filepath.Join(t.TempDir(), "more.csv")
	if err := os.WriteFile(more, shifted, 0o644); err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]struct {
		files  []string
		points bool
	}{"demo": {[]string{"demo"}, true}, "ten scans": {[]string{"demo", more}, false}} {
		t.Run(name, func(t *testing.T) {
			sheet := calibrated(t, c.files...)
			var b bytes.Buffer
			if err := sheet.Write(&b, "pdf"); err != nil {
				t.Fatal(err)
			}
			if n := len(regexp.MustCompile(`/Type /Page\b`).FindAll(b.Bytes(), -1)); n != 1 {
				t.Errorf("%d pages", n)
			}
			box := regexp.MustCompile(`/MediaBox \[0 0 ([0-9.]+) ([0-9.]+)\]`).FindSubmatch(b.Bytes())
			if box == nil {
				t.Fatal("no size")
			}
			const a4 = 842 // points of 1/72 inch
			if high, _ := strconv.ParseFloat(string(box[2]), 64); !(high > 400 && high <= a4) {
				t.Errorf("the page is %v points high, A4 is %d", high, a4)
			}
			page := strings.Join(sheet.Answer.Figures[0].Notes, "\n")
			if strings.Contains(page, "CCN/CN counted): ") != c.points {
				t.Errorf("points on the page: want %t\n%s", c.points, page)
			}
		})
	}
}

// The record as text has data, model, constants, result and version.
func TestRecordText(t *testing.T) {
	var b bytes.Buffer
	if err := calibrated(t, "demo").Write(&b, "text"); err != nil {
		t.Fatal(err)
	}
	whole := strings.Join(strings.Fields(b.String()), " ")
	for _, want := range []string{
		"written by dropcrest 9.9.", "110 rows, 5 scans, 2026-03-13 09:00:00 to 2026-03-13 10:14:30 UTC",
		"activation curve two-step", "Ammonium sulfate: ion interaction (Pitzer & Mayorga 1973", "shape factor 1;", "molar gas constant 8.314462618 J/(mol K)",
		"55.50 0/1545", "46.06 1473/1537", "Left out: no point.", "Result: S = (0.06393 ± 0.00020) %/K", "covariance of intercept and slope -1.71e-07",
		"carried to another pressure by the power 1 of it, and not to another flow", "+1 % of all sizes moves it by -1.56 %",
	} {
		if !strings.Contains(whole, want) {
			t.Errorf("%q is not in the record", want)
		}
	}
}
