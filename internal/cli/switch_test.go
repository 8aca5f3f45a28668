package cli

import (
	"slices"
	"strings"
	"testing"
)

// TestCompleteSwitch: both laws and the form are offered.
func TestCompleteSwitch(t *testing.T) {
	for _, line := range []string{"switch --from us-osha-general-industry", "switch --to company-example", "switch --format json"} {
		words := strings.Split(line, " ")
		_, out, _ := call(append([]string{completeCommand}, words[0], words[1], words[2][:2])...)
		if !slices.Contains(strings.Split(out, "\n"), words[2]) {
			t.Errorf("%s is not offered: %s", line, out)
		}
	}
	if _, out, _ := call(completeCommand, "switch", "--format", "x"); slices.Contains(strings.Split(out, "\n"), "xlsx") {
		t.Error("a form is offered that there is not")
	}
}

// TestSwitchHoldsNoAudiometricFigures, in any form, as no other output does.
func TestSwitchHoldsNoAudiometricFigures(t *testing.T) {
	t.Parallel()
	dir := writeDemo(t)
	births, figures := privateTexts(t, dir)
	for _, format := range []string{"text", "json"} {
		code, out, errs := call("switch", dir, "--to", "company-example", "--format", format, "--width", "1000")
		if code != exitClean || len(out) < 5000 {
			t.Fatalf("%s: exit code %d, %s", format, code, errs)
		}
		for _, text := range append(births, figures...) {
			if text != "" && strings.Contains(out, text) {
				t.Errorf("the form %s shows %q", format, text)
			}
		}
		if hit := audiometric.FindString(out); hit != "" {
			t.Errorf("the form %s shows %q", format, hit)
		}
	}
}

// TestSwitchWithPseudonyms shows codes in place of the ids of workers, the same under both laws.
func TestSwitchWithPseudonyms(t *testing.T) {
	t.Parallel()
	dir := writeDemo(t)
	key := t.TempDir() + "/key"
	if code, _, errs := call("key", key); code != exitClean {
		t.Fatal(errs)
	}
	_, plain, _ := call("switch", dir, "--to", "company-example")
	code, veiled, errs := call("switch", dir, "--to", "company-example", "--pseudonyms", key)
	if code != exitClean {
		t.Fatal(errs)
	}
	if !strings.Contains(plain, "K0145") || strings.Contains(veiled, "K0145") {
		t.Error("the id of a worker is shown")
	}
	if plain == veiled || strings.Count(plain, "nothing owed before, gap now") != strings.Count(veiled, "nothing owed before, gap now") {
		t.Error("other ids give another result")
	}
}
