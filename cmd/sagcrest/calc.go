package main

import (
	"encoding/json"
	"fmt"
	"io"
	"maps"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"sagcrest/cmd/sagcrest/internal/calc"
	"sagcrest/cmd/sagcrest/internal/wire"
	"sagcrest/config/diag"
)

// calcCommand does one desk calculation.
func (a *app) calcCommand() *cobra.Command {
	c := &cobra.Command{
		Use:   "calc TOPIC name=value…",
		Short: "one desk calculation with its working",
		Example: `  sagcrest calc curve pvc='{"station": 10000, "elev": 1000}' g1=-4 g2=2 length=500
  sagcrest calc sight kind=crest sight=185m g1=2 g2=-3.75
  sagcrest calc --list`,
		Args: cobra.ArbitraryArgs,
		RunE: func(c *cobra.Command, args []string) error {
			if list, _ := c.Flags().GetBool("list"); list {
				return a.tellTopics()
			}
			units, _ := c.Flags().GetString("units")
			return a.calculate(args, units)
		},
	}
	c.Flags().String("units", "metric", "what bare numbers mean, in and out: `metric or us`")
	c.Flags().Bool("list", false, "list the topics and their inputs by chapter")
	return c
}

func (a *app) calculate(args []string, units string) error {
	if units != "metric" && units != "us" {
		return &usageError{message: fmt.Sprintf("unknown units %q", units), hint: "--units metric or --units us"}
	}
	if len(args) == 0 {
		return &usageError{message: "calc needs a topic", hint: "sagcrest calc --list"}
	}
	topic, ok := calc.Find(args[0])
	if !ok {
		return unknown("topic", args[0], calc.Names())
	}
	inputs, err := a.calcInputs(args[1:])
	if err != nil {
		return err
	}
	system := calc.System(units)
	result, steps, fault := topic.Run(inputs, system)
	if fault != nil {
		help := fault.Help
		word := fault.Field[strings.LastIndex(fault.Field, ".")+1:]
		if fault.Field == "name" {
			word, _ = inputs["name"].(string)
		}
		if near := diag.Nearest(word, fault.Known); near != "" {
			help = "did you mean " + near + "?"
		}
		return badInput([]diag.Problem{{Code: fault.Code, Severity: 'E', Key: fault.Field, Message: fault.Message, Help: help}})
	}
	if a.opt.JSON {
		return a.print(calc.Document(topic, system, inputs, result, steps))
	}
	text, err := calc.Paper(topic, system, inputs, result, steps)
	if err != nil {
		return err
	}
	_, err = io.WriteString(a.out, text)
	return err
}

// calcInputs reads name=value arguments, or one JSON object from standard input.
func (a *app) calcInputs(args []string) (map[string]any, error) {
	inputs := map[string]any{}
	if len(args) == 1 && args[0] == "-" {
		// A calculation's inputs are a page of numbers at most.
		text, err := io.ReadAll(io.LimitReader(a.in, 16<<20))
		if err != nil {
			return nil, fileTrouble("standard input", reason(err), "")
		}
		if err := json.Unmarshal(text, &inputs); err != nil {
			return nil, badInput([]diag.Problem{{Code: "F02", Severity: 'E', File: "standard input",
				Message: "no JSON object: " + err.Error(), Help: `write one object, such as {"radius": 300, "delta": 50}`}})
		}
		return inputs, nil
	}
	for _, arg := range args {
		name, value, ok := strings.Cut(arg, "=")
		if !ok {
			return nil, &usageError{message: fmt.Sprintf("%q is no input", arg), hint: "write name=value, or - for a JSON object on standard input"}
		}
		if _, twice := inputs[name]; twice {
			return nil, badInput([]diag.Problem{{Code: "F08", Severity: 'E', Key: name, Message: name + " is given twice", Help: "keep one"}})
		}
		var v any
		if err := json.Unmarshal([]byte(value), &v); err != nil {
			v = value // a word, or a number with its unit
		}
		inputs[name] = v
	}
	return inputs, nil
}

// tellTopics lists the topics by chapter.
func (a *app) tellTopics() error {
	if a.opt.JSON {
		return a.print(topicsDocument())
	}
	chapter := map[string][]calc.Topic{}
	for _, t := range calc.Topics() {
		chapter[t.Chapter] = append(chapter[t.Chapter], t)
	}
	for _, name := range slices.Sorted(maps.Keys(chapter)) {
		fmt.Fprintln(a.out, name)
		for _, t := range chapter[name] {
			fmt.Fprintf(a.out, "  %-12s %s\n", t.Name, t.Title)
			for _, in := range t.Inputs() {
				fmt.Fprintf(a.out, "      %-16s %-8s %s\n", in.Name, in.Unit, in.Doc)
			}
		}
	}
	return nil
}

// topicDocument is a topic with what it takes.
type topicDocument struct {
	Name    string       `json:"name"`
	Title   string       `json:"title"`
	Chapter string       `json:"chapter"`
	Inputs  []calc.Input `json:"inputs"`
}

func topicsDocument() any {
	d := struct {
		wire.Head
		Topics []topicDocument `json:"topics"`
	}{Head: wire.HeadOf("topics")}
	for _, t := range calc.Topics() {
		d.Topics = append(d.Topics, topicDocument{t.Name, t.Title, t.Chapter, t.Inputs()})
	}
	return d
}
