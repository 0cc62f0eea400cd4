package fieldfile

import (
	"io"
	"math"
	"strings"
	"testing"
	"testing/iotest"
)

func TestCSVGrammar(t *testing.T) {
	for name, c := range map[string]struct {
		text string
		use  string
		want []Cell // of the first column, by record
	}{
		"LF":                        {"kappa\n0.5\n0.25\n", "", []Cell{{0.5, Value}, {0.25, Value}}},
		"CR LF":                     {"kappa\r\n0.5\r\n", "", []Cell{{0.5, Value}}},
		"no line end at the end":    {"kappa\n0.5", "", []Cell{{0.5, Value}}},
		"byte order mark":           {"\uFEFFkappa\n0.5\n", "", []Cell{{0.5, Value}}},
		"empty lines at the end":    {"kappa,x\n0.5,1\n\n\r\n", "", []Cell{{0.5, Value}}},
		"empty is missing":          {"kappa,x\n,1\n", "", []Cell{{}}},
		"words for missing":         {"kappa\nNaN\nNA\nnull\nn/a\n", "", []Cell{{}, {}, {}, {}}},
		"below and above":           {"kappa\n<0.5\n> 7\n", "", []Cell{{0.5, Below}, {7, Above}}},
		"blanks around a number":    {"kappa, x\n 0.5 ,1\n", "", []Cell{{0.5, Value}}},
		"quoted number":             {"kappa,x\n\"0.5\",1\n", "", []Cell{{0.5, Value}}},
		"quoted comma in a name":    {"\"kappa, of all\",x\n0.5,1\n", "", []Cell{{0.5, Value}}},
		"line break in quotes":      {"kappa,x\n0.5,\"a\nb\"\"c,\nd\"\n0.25,\n", "", []Cell{{0.5, Value}, {0.25, Value}}},
		"no header":                 {"0.5,1\n0.25,2\n", "column1=kappa", []Cell{{0.5, Value}, {0.25, Value}}},
		"exponents and signs":       {"kappa\n+5e-1\n-2.5E1\n", "", []Cell{{0.5, Value}, {-25, Value}}},
		"17 digits":                 {"kappa\n0.12345678901234567\n", "", []Cell{{0.12345678901234567, Value}}},
		"100 nm is 1e-7 m":          {"diameter (nm)\n100\n", "", []Cell{{1e-7, Value}}},
		"0.3 % is 0.003":            {"supersaturation (%)\n0.3\n", "", []Cell{{0.003, Value}}},
		"saturation ratio":          {"s\n1.5\n", "s=supersaturation in saturation ratio", []Cell{{0.5, Value}}},
		"per ln D becomes per lg D": {"n\n1\n", "n=dN/dlnD @50nm in m-3", []Cell{{math.Ln10, Value}}},
	} {
		t.Run(name, func(t *testing.T) {
			f := open(t, c.text)
			if c.use != "" {
				f = open(t, c.text, c.use)
			}
			got := all(t, f)
			if len(got) != len(c.want) {
				t.Fatalf("%d records, want %d", len(got), len(c.want))
			}
			for i := range got {
				if !sameCell(got[i].Cells[0], c.want[i]) {
					t.Errorf("record %d: got %v, want %v", i, got[i].Cells[0], c.want[i])
				}
			}
		})
	}
}

func TestCSVErrorsSayWhere(t *testing.T) {
	for name, c := range map[string]struct {
		text         string
		line, column int
		says         string
	}{
		"empty file":              {"", 0, 0, "empty"},
		"only blanks":             {" \n\n", 0, 0, "empty"},
		"no number":               {"time,kappa\n2026-03-14,0.5\n2026-03-15,abc\n", 3, 12, `"abc" is no number (column kappa)`},
		"column in characters":    {"text µ,kappa\nµµµ,x\n", 2, 5, `"x" is no number`},
		"hexadecimal":             {"kappa\n0x1p3\n", 2, 1, "no number"},
		"underscore":              {"kappa\n1_000\n", 2, 1, "no number"},
		"infinity":                {"kappa\ninf\n", 2, 1, "no number"},
		"too large":               {"kappa\n1e999\n", 2, 1, "no number"},
		"decimal comma":           {"kappa,x\n0,5,1\n", 2, 0, "3 fields instead of 2: want as many fields as there are names; a decimal comma"},
		"quoted decimal comma":    {"kappa,x\n\"0,5\",1\n", 2, 1, `"0,5" is no number`},
		"too few":                 {"kappa,x\n0.5\n0.5,1\n", 2, 0, "1 fields instead of 2"},
		"truncated":               {"kappa,x,y\n0.5,1,2\n0.5,1", 3, 0, "the file ends inside a record"},
		"empty line between":      {"kappa,x\n0.5,1\n\n0.5,1\n", 3, 1, "an empty line between records"},
		"quote inside":            {"kappa,x\n0.5,a\"b\n", 2, 6, "a quote inside a field"},
		"text after quote":        {"kappa,x\n0.5,\"a\"b\n", 2, 8, "after a closing quote"},
		"quote without end":       {"kappa,x\n0.5,\"a\n1,2\n", 2, 5, "does not end"},
		"semicolons":              {"kappa;x\n0,5;1\n", 1, 0, `parted by ";"`},
		"comments first":          {"# hello\nkappa\n", 1, 1, "a # line"},
		"CR alone":                {"kappa\r0.5\r0.6\r\n", 1, 6, "a CR inside a line"},
		"no time":                 {"time\n14.03.2026\n", 2, 1, `"14.03.2026" is no time`},
		"numbers as time":         {"time\n3600\n", 2, 1, "time=time in seconds since 2026-03-14"},
		"February 30":             {"time\n2026-02-30\n", 2, 1, "no time"},
		"escape in a field":       {"kappa\n\x1b[31m5\n", 2, 1, `"[31m5" is no number`},
		"netCDF classic":          {"CDF\x01\x00\x00", 0, 0, "netCDF (classic), which is not read: want an export as CSV"},
		"netCDF 64 bit":           {"CDF\x05\x00\x00", 0, 0, "netCDF (classic)"},
		"netCDF-4":                {"\x89HDF\r\n\x1a\nxxx", 0, 0, "netCDF-4"},
		"compressed":              {"\x1f\x8b\x08", 0, 0, "compressed"},
		"spreadsheet":             {"PK\x03\x04", 0, 0, "spreadsheet"},
		"UTF-16":                  {"\xff\xfek\x00", 0, 0, "UTF-16"},
		"binary":                  {"a,b\n\x00\x01", 0, 0, "no text"},
		"two-dimensional":         {"30, 2110\n", 1, 0, "2110 (two independent variables) is not read"},
		"two-dimensional in Ames": {"30 2310\n", 1, 0, "2310"},
	} {
		t.Run(name, func(t *testing.T) { says(t, failure(c.text, Options{}), c.line, c.column, c.says) })
	}
}

func TestCSVLenient(t *testing.T) {
	text := "# a campaign\n# of two rows\nkappa;cn (cm-3)\n0,5;1000\n\n0,25;2000\n"
	f, err := Open("f", strings.NewReader(text), Options{Lenient: true})
	if err != nil {
		t.Fatal(err)
	}
	got := all(t, f)
	if len(got) != 2 || got[0].Cells[0].X != 0.5 || got[1].Cells[1].X != 2e9 || len(f.Comments) != 2 {
		t.Errorf("got %v, comments %q", got, f.Comments)
	}
	for _, code := range []string{"parted", "decimal_comma"} {
		if !noted(f, code) {
			t.Errorf("nothing said on %s", code)
		}
	}
}

func TestCSVNotes(t *testing.T) {
	for code, text := range map[string]string{
		"no_header": "0.5,1\n", "twice": "kappa,kappa\n1,2\n", "no_offset": "time\n2026-03-14 08:00\n",
		"leap_second": "time\n2026-12-31T23:59:60Z\n", "nines": "kappa\n-9999\n", "time_back": "time\n2026-03-14\n2026-03-13\n",
		"end_before_start": "start_time,end_time\n2026-03-14,2026-03-13\n", "ask": "cn\n1\n", "unit": "cn (K)\n1\n",
		"second": "cn (cm-3),CN (1/cm3)\n1,2\n",
	} {
		f := open(t, text)
		_, _ = readAll(f)
		if !noted(f, code) {
			t.Errorf("%s is not noted for %q: %v", code, text, f.Notes())
		}
	}
}

// However the source hands out its bytes, the records are the same.
func TestCSVInSmallPieces(t *testing.T) {
	text := string(campaign(200))
	want := all(t, open(t, text))
	for name, r := range map[string]io.Reader{
		"bytes": iotest.OneByteReader(strings.NewReader(text)), "halves": iotest.HalfReader(strings.NewReader(text)),
		"data with EOF": iotest.DataErrReader(strings.NewReader(text)),
	} {
		f, err := Open("f", r, Options{})
		if err != nil {
			t.Fatal(err)
		}
		got := all(t, f)
		if len(got) != len(want) {
			t.Fatalf("%s: %d records, want %d", name, len(got), len(want))
		}
		for i := range got {
			if got[i].Start != want[i].Start || !sameCell(got[i].Cells[7], want[i].Cells[7]) {
				t.Fatalf("%s: record %d differs", name, i)
			}
		}
	}
}

func TestAFailingDiskIsSaid(t *testing.T) {
	for _, at := range []int{0, 5, 30, 200} {
		r := io.MultiReader(strings.NewReader(string(campaign(10))[:at]), iotest.ErrReader(io.ErrUnexpectedEOF))
		f, err := Open("f", r, Options{})
		if err == nil {
			_, err = readAll(f)
		}
		if err == nil || err == io.EOF || !strings.Contains(err.Error(), "cannot be read") {
			t.Errorf("after %d bytes: %v", at, err)
		}
	}
}

// A hostile file cannot fill the memory: a line without end is refused.
func TestALineWithoutEnd(t *testing.T) {
	endless := io.MultiReader(strings.NewReader("kappa\n"), repeat('1'))
	f, err := Open("f", endless, Options{})
	if err != nil {
		t.Fatal(err)
	}
	_, err = readAll(f)
	says(t, err, 2, 0, "longer than 16 MiB")
}

type repeat byte

func (c repeat) Read(b []byte) (int, error) {
	for i := range b {
		b[i] = byte(c)
	}
	return len(b), nil
}

// Names, units, comments and error texts of a hostile file are clean.
func TestNothingDrivesTheTerminal(t *testing.T) {
	f := open(t, "kappa\x1b[2J,\u202Ecn (cm-3)\n0.5,1\n")
	for _, c := range f.Columns {
		if strings.ContainsAny(c.Name+c.Unit, "\x1b\u202E") {
			t.Errorf("column %q", c.Name)
		}
	}
	if err := failure("kappa\n\x1b]0;title\a\n", Options{}); strings.ContainsAny(err.Error(), "\x1b\a") {
		t.Errorf("error %q", err)
	}
}
