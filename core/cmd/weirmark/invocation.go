package main

import (
	"encoding/json"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"

	"weirmark/core/message"
)

// invocation is one call of the command.
type invocation struct {
	out, errs io.Writer
	plain     []string
	flags     map[string]string
}

// parse takes flags anywhere among the plain arguments, as --name value or
// --name=value. The flags say which take a value. After "--" all is plain.
func (v *invocation) parse(args []string, flags map[string]bool) error {
	v.flags = map[string]string{}
	for i := 0; i < len(args); i++ {
		arg := args[i]
		if arg == "--" {
			v.plain = append(v.plain, args[i+1:]...)
			return nil
		}
		name, isFlag := strings.CutPrefix(arg, "--")
		if !isFlag {
			v.plain = append(v.plain, arg)
			continue
		}
		name, value, joined := strings.Cut(name, "=")
		takes, known := flags[name]
		switch {
		case !known:
			return fmt.Errorf("there is no flag --%s", name)
		case !takes && joined:
			return fmt.Errorf("--%s takes no value", name)
		case takes && !joined:
			if i++; i >= len(args) {
				return fmt.Errorf("--%s needs a value", name)
			}
			value = args[i]
		}
		if _, twice := v.flags[name]; twice {
			return fmt.Errorf("--%s is given twice", name)
		}
		v.flags[name] = value
	}
	return nil
}

func (v *invocation) json() bool {
	_, wanted := v.flags["json"]
	return wanted
}

// onOff reads a switch that is off unless it says otherwise.
func (v *invocation) onOff(name string) (bool, error) {
	switch v.flags[name] {
	case "", "off":
		return false, nil
	case "on":
		return true, nil
	}
	return false, fmt.Errorf("--%s is on or off, not %q", name, v.flags[name])
}

// file returns the one plain argument.
func (v *invocation) file(what string) (string, error) {
	if len(v.plain) != 1 {
		return "", fmt.Errorf("give one %s; there are %d arguments", what, len(v.plain))
	}
	return v.plain[0], nil
}

// load reads a file; the core knows it by its name alone.
func load(path string) (string, []byte, error) {
	data, err := os.ReadFile(path)
	if err != nil {
		return "", nil, err
	}
	return filepath.Base(path), data, nil
}

// ask sends a request to the core. The error is the reply's refusal, with
// file, line and column.
func ask(s *message.Session, q message.Request, attached ...[]byte) (message.Reply, [][]byte, error) {
	q.Protocol, q.Number = message.Protocol, 1
	request, err := json.Marshal(q)
	if err != nil {
		return message.Reply{}, nil, err
	}
	raw, files := s.Handle(request, attached)
	var r message.Reply
	if err := json.Unmarshal(raw, &r); err != nil {
		panic("the core's reply cannot be read: " + err.Error())
	}
	if r.Error != nil {
		return r, files, *r.Error
	}
	return r, files, nil
}

// notices writes notices to the error stream: stop and ask by name.
func (v *invocation) notices(list []message.Finding) {
	for _, n := range list {
		at := ""
		if n.Line > 0 {
			at = fmt.Sprintf("line %d: ", n.Line)
		}
		fmt.Fprintf(v.errs, "%s: %s%s [%s]\n", n.Severity, at, n.Text, n.Code)
	}
}

// printJSON writes one value, indented.
func (v *invocation) printJSON(value any) error {
	e := json.NewEncoder(v.out)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	return e.Encode(value)
}

// splitTable splits FILE@TABLE; a file of the whole name goes first.
func splitTable(arg string) (path, table string) {
	if _, err := os.Stat(arg); err == nil {
		return arg, ""
	}
	if cut := strings.LastIndexByte(arg, '@'); cut > 0 {
		return arg[:cut], arg[cut+1:]
	}
	return arg, ""
}

func number(text string) (float64, error) {
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		return 0, fmt.Errorf("%q is not a number", text)
	}
	return v, nil
}
