package command

import (
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"dropcrest/atmos"
	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/figure/print"
	"dropcrest/ui/form"
	"dropcrest/ui/scenario"
)

// options are the values of one command line. Options of the scenario are kept
// as text in their order and applied when the file that they override is read.
type options struct {
	given    []setting
	fromFile string

	substancesFile string
	env            func(string) string // where the default file is
	known          *solutes.Catalogue  // nil: not read yet

	isPlain bool
	as, out string

	table, picture string // keys of the parts that are written

	set      *pflag.FlagSet
	question answer.Question
}

// setting is one option as it was given.
type setting struct{ key, text string }

// pathOf is the input or the list of rows that a setting is about.
func (o *options) pathOf(g setting) scenario.Path {
	if o.question.Means != nil {
		if p, ok := o.question.Means(g.key, g.text); ok {
			return p
		}
	}
	return o.path(g.key)
}

func newOptions(cmd *cobra.Command) *options {
	cmd.Flags().SortFlags = false
	return &options{set: cmd.Flags()}
}

// Groups of options, kept at each flag for help.
const groupKey = "group"

func (o *options) group(name, group string) {
	_ = o.set.SetAnnotation(name, groupKey, []string{group})
}

const outputGroup = "Input and output"

func (o *options) from(*cobra.Command) {
	o.set.StringVar(&o.fromFile, "from", "", "`FILE` with a scenario to start from, - for standard input. Options override it.")
	o.group("from", outputGroup)
}

func (o *options) plain(*cobra.Command) {
	o.set.BoolVar(&o.isPlain, "plain", false, "Write text in ASCII. Default: when the locale is not UTF-8.")
	o.group("plain", outputGroup)
}

// form adds --as with these formats, the first one being the default, and --out.
func (o *options) form(cmd *cobra.Command, formats ...string) {
	o.set.StringVar(&o.as, "as", "", fmt.Sprintf("`FORM` of the answer: %s. Default: by the ending of --out, else %s.",
		strings.Join(formats, ", "), formats[0]))
	o.group("as", outputGroup)
	o.set.StringVar(&o.out, "out", "", "`FILE` to write, whole or not at all; - is standard output.")
	o.group("out", outputGroup)
	_ = cmd.RegisterFlagCompletionFunc("as", cobra.FixedCompletions(formats, cobra.ShellCompDirectiveNoFileComp))
	cmd.PreRunE = func(*cobra.Command, []string) (err error) {
		if o.set.Changed("out") && o.out == "" {
			return misused("--out needs the name of a file, or - for standard output")
		}
		if o.as, err = chooseForm(o.as, o.out, formats); err != nil {
			return err
		}
		return o.checkParts()
	}
}

// parts adds the options that choose one table or picture of several.
func (o *options) parts(cmd *cobra.Command) {
	o.set.StringVar(&o.table, "table", "", "`KEY` of the table that csv and jsonl write; a key that is none lists them. Default: the main one.")
	o.group("table", outputGroup)
	o.set.StringVar(&o.picture, "picture", "", "`KEY` of the picture that svg, png and pdf write; a key that is none lists them. Default: the main one.")
	o.group("picture", outputGroup)
	for _, name := range []string{"table", "picture"} {
		_ = cmd.RegisterFlagCompletionFunc(name, cobra.NoFileCompletions)
	}
}

func (o *options) checkParts() error {
	switch {
	case o.table != "" && !form.OneTable(o.as):
		return misused("--table and --as %s contradict each other: one table is written as csv or jsonl", o.as)
	case o.picture != "" && !form.OnePicture(o.as):
		return misused("--picture and --as %s contradict each other: one picture is written as %s", o.as, strings.Join(print.Formats(), ", "))
	}
	return nil
}

// chooseForm checks --as, or takes the form from the ending of the file. An
// ending that names no form is refused, so that no text goes into a plot.jpg.
func chooseForm(as, out string, formats []string) (string, error) {
	if as != "" {
		if !slices.Contains(formats, as) {
			return "", misused("--as %q: want %s", as, strings.Join(formats, ", "))
		}
		return as, nil
	}
	ending := strings.ToLower(filepath.Ext(out))
	if ending == "" {
		return formats[0], nil
	}
	var endings []string
	for _, f := range formats {
		if form.Ending(f) == ending {
			return f, nil
		}
		endings = append(endings, form.Ending(f))
	}
	return "", misused("--out %s: the ending %s names no form: want one of %s, or say which form by --as",
		out, ending, strings.Join(endings, ", "))
}

// inputs adds every input of a question as an option.
func (o *options) inputs(cmd *cobra.Command, q answer.Question) {
	o.question = q
	s := scenario.Default()
	lists := q.Lists(&s)
	for _, group := range q.Groups {
		for option, path := range group.Options() {
			if in, ok := scenario.Find(&s, path); ok {
				o.input(cmd, group.Title, option, in)
			}
			for _, l := range lists {
				if scenario.Path(l.Key()) == path {
					o.list(cmd, group.Title, option, l)
				}
			}
		}
	}
}

func (o *options) input(cmd *cobra.Command, group, key string, in scenario.Input) {
	o.set.Var(&late{o, key, placeholder(in)}, key, inputHelp(in))
	o.group(key, group)
	if isFile(in) {
		return // the shell knows files
	}
	var words []string
	for _, c := range in.Choices() {
		words = append(words, c.Word+"\t"+c.Says)
	}
	_ = cmd.RegisterFlagCompletionFunc(key, cobra.FixedCompletions(words, cobra.ShellCompDirectiveNoFileComp))
}

func (o *options) list(cmd *cobra.Command, group, key string, l scenario.RowList) {
	o.set.Var(&late{o, key, "ROW"}, key, l.Help()+" May be given several times. Default: "+l.Show(scenario.Style{})+".")
	o.group(key, group)
	if l.Len() > 0 && isFile(l.Row(0)...) {
		return
	}
	complete := cobra.NoFileCompletions
	if l.Len() > 0 && slices.ContainsFunc(l.Row(0), func(in scenario.Input) bool { return in.Kind() == scenario.Name }) {
		complete = o.names()
	}
	_ = cmd.RegisterFlagCompletionFunc(key, complete)
}

// late is an option whose value is read later, with the scenario it changes.
type late struct {
	options *options
	key     string
	shape   string // placeholder in help
}

func (l *late) String() string { return "" }
func (l *late) Type() string   { return l.shape }
func (l *late) Set(text string) error {
	l.options.given = append(l.options.given, setting{l.key, text})
	return nil
}

// scenario reads the file and applies the options. Notes say which of them the
// question does not look at.
func (o *options) scenario(w world) (scenario.Scenario, []atmos.Note, error) {
	s := scenario.Default()
	known, err := o.catalogue()
	if err != nil {
		return s, nil, err
	}
	s.Use(known)
	if o.set.Changed("from") {
		read, err := o.read(w)
		if err != nil {
			return s, nil, err
		}
		s = read
	}
	fresh := map[string]bool{}
	given := map[scenario.Path]string{}
	for _, g := range o.given {
		if err := apply(&s, o.pathOf(g), g.text, !fresh[g.key]); err != nil {
			return s, nil, misused("--%s: %v", g.key, err)
		}
		fresh[g.key], given[o.pathOf(g)] = true, g.key
	}
	if err := o.implied(&s, given); err != nil {
		return s, nil, err
	}
	if o.question.Given != nil {
		o.question.Given(&s, func(option string) bool { return fresh[option] })
	}
	if s.WaterActivity == "kappa" && fresh["kappa"] && s.Kappa.Word == "" && !fresh["component"] && o.fromFile == "" {
		s.Components = nil // kappa alone says what the particle is made of
	}
	if wrong := scenario.Check(&s); len(wrong) > 0 {
		return s, nil, misused("--%s: %v", o.option(wrong[0].Path), wrong[0])
	}
	return s, o.unused(&s), nil
}

// path is the input or the list of rows that an option sets.
func (o *options) path(option string) scenario.Path {
	if p, ok := o.question.PathOf(option); ok {
		return p
	}
	return scenario.Path(option)
}

// option is the option that sets an input, or its path where there is none.
func (o *options) option(p scenario.Path) string {
	if option, ok := o.question.OptionOf(p); ok {
		return option
	}
	return string(p)
}

func apply(s *scenario.Scenario, p scenario.Path, text string, first bool) error {
	if in, ok := scenario.Find(s, p); ok {
		return in.SetWithUnit(text)
	}
	return scenario.SetRow(s, string(p), text, first)
}

// read reads the scenario file.
func (o *options) read(w world) (scenario.Scenario, error) {
	name, in := o.fromFile, w.in
	if name == "" {
		return scenario.Scenario{}, misused("--from needs the name of a file, or - for standard input")
	}
	if name == "-" {
		name = "standard input"
	} else {
		f, err := os.Open(name)
		if err != nil {
			return scenario.Scenario{}, fmt.Errorf("--from: %w", pathError(err))
		}
		defer f.Close()
		if info, err := f.Stat(); err == nil && info.IsDir() {
			return scenario.Scenario{}, fmt.Errorf("--from: %s is a folder, want a scenario file", name)
		}
		in = f
	}
	s, err := scenario.DecodeUsing(o.known, name, in)
	if err != nil {
		return s, fileError{"--from: ", err}
	}
	return s, nil
}

// pathError says what failed without the name of the system call.
func pathError(err error) error {
	var p *os.PathError
	if errors.As(err, &p) {
		return fmt.Errorf("%s: %w", p.Path, p.Err)
	}
	return err
}
