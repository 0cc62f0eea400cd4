package form

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"strings"
	"testing"

	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

func sheet(t *testing.T) Sheet {
	t.Helper()
	q := answer.Questions()[0]
	s := scenario.Default()
	a, err := q.Ask(context.Background(), answer.Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	return Sheet{Question: q, Scenario: s, Answer: a, Version: "test", Width: 80}
}

// Every form that is offered can be written, and looks like what it is.
func TestEveryFormat(t *testing.T) {
	begins := map[string]string{"text": "A dry particle of 100 nm", "csv": "wet_radius_m,", "json": "{\n", "svg": "<?xml", "png": "\x89PNG", "pdf": "%PDF"}
	for _, format := range Formats() {
		var b bytes.Buffer
		if err := sheet(t).Write(&b, format); err != nil {
			t.Errorf("%s: %v", format, err)
		}
		if begins[format] == "" || !strings.HasPrefix(b.String(), begins[format]) {
			t.Errorf("%s begins %q", format, b.String()[:min(b.Len(), 20)])
		}
	}
}

func TestTextFits(t *testing.T) {
	s := sheet(t)
	s.ASCII = true
	var b bytes.Buffer
	if err := s.Write(&b, "text"); err != nil {
		t.Fatal(err)
	}
	for _, line := range strings.Split(b.String(), "\n") {
		if len(line) > s.Width {
			t.Errorf("a line of %d columns: %q", len(line), line)
		}
	}
	for i, c := range b.Bytes() {
		if c > 126 || c < ' ' && c != '\n' {
			t.Fatalf("byte %d is %#x, not printable ASCII", i, c)
		}
	}
}

// A frame that is given decides what the picture shows.
func TestFrameCounts(t *testing.T) {
	s := sheet(t)
	var fitted, given bytes.Buffer
	if err := s.Write(&fitted, "svg"); err != nil {
		t.Fatal(err)
	}
	s.Frame, _ = figure.Fit(s.Answer.Figures[0], figure.Frame{}, 24)
	s.Frame.XMax *= 10
	if err := s.Write(&given, "svg"); err != nil {
		t.Fatal(err)
	}
	if bytes.Equal(fitted.Bytes(), given.Bytes()) {
		t.Error("the frame does not count")
	}
}

// The keys of an object keep their order, and signs stay as they are.
// On paper every bar has a row, however many there are.
func TestEveryBarIsWritten(t *testing.T) {
	s := sheet(t)
	bars := figure.Figure{Key: "bars", Title: "costs", X: figure.Axis{Says: "cost", Unit: "%"}}
	for i := range 2 * pictureHeight {
		bars.Bars = append(bars.Bars, figure.Bar{Says: fmt.Sprintf("assumption %d", i+1), Value: float64(-i), Text: fmt.Sprintf("%d %%", -i)})
	}
	s.Answer.Figures = append(s.Answer.Figures, bars)
	s.Picture = bars.Key
	for _, format := range []string{"text", "svg"} {
		var b bytes.Buffer
		if err := s.Write(&b, format); err != nil {
			t.Fatal(err)
		}
		for _, bar := range bars.Bars {
			if !strings.Contains(b.String(), bar.Says) || !strings.Contains(b.String(), bar.Text) {
				t.Errorf("the %s lacks %s, %s", format, bar.Says, bar.Text)
			}
		}
	}
}

func TestObject(t *testing.T) {
	got, err := json.Marshal(Object{{"b", 1}, {"a", []string{}}, {"c", nil}})
	if want := `{"b":1,"a":[],"c":null}`; err != nil || string(got) != want {
		t.Errorf("%s (%v), want %s", got, err, want)
	}
	var b bytes.Buffer
	if err := Indented(&b, Object{{"says", "a < b & c"}}); err != nil || b.String() != "{\n  \"says\": \"a < b & c\"\n}\n" {
		t.Errorf("%q (%v)", b.String(), err)
	}
}

func TestRefused(t *testing.T) {
	empty := sheet(t)
	empty.Answer.Tables, empty.Answer.Figures = nil, nil
	for format, says := range map[string]string{"csv": "no table", "svg": "no picture", "docx": "want text, csv"} {
		if err := empty.Write(&bytes.Buffer{}, format); err == nil || !strings.Contains(err.Error(), says) {
			t.Errorf("%s: error %v, want one that says %q", format, err, says)
		}
	}
}
