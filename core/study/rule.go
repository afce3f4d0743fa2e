package study

import (
	"slices"

	"weirmark/core/refinement"
)

// rule returns the options of the grid study.
func (c Choices) rule() refinement.Options {
	return refinement.Options{Rule: c.Rule, Bounded: c.Bounded, Formal: c.Formal, Method: c.Interpolation, Safety: c.Safety}
}

// RuleName returns the rule of the grid study in words.
func (c Choices) RuleName() string {
	if c.Rule != "" && c.Rule != refinement.RuleThree {
		return RuleName(c.Rule)
	}
	if c.Bounded {
		return "bounded rule"
	}
	return "plain rule"
}

// RuleName returns the name of a rule of package refinement for a reader.
func RuleName(rule string) string {
	switch rule {
	case "", refinement.RuleThree:
		return "three finest grids"
	case refinement.RuleTwo:
		return "two finest grids, factor 3, formal order"
	case refinement.RuleFormal:
		return "three finest grids, order at most the formal one"
	case refinement.RuleLeastSquares:
		return "least squares over all grids"
	case refinement.RuleCorrection:
		return "correction factor"
	case refinement.RuleFactor:
		return "factor of safety"
	case refinement.RuleRange:
		return "three finest grids, 3 times their range where they oscillate"
	}
	return rule
}

// enterRule changes the rule of the grid study.
func (c *Choices) enterRule(value string) (string, error) {
	before := c.Rule
	if before == "" {
		before = refinement.RuleThree
	}
	if value == "" || value == refinement.RuleThree {
		c.Rule = ""
		return before, nil
	}
	if !slices.Contains(refinement.Rules, value) {
		return before, refuse("a rule of the grid study", value)
	}
	c.Rule = value
	return before, nil
}
