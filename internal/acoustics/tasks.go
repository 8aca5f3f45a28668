package acoustics

import (
	"fmt"
	"math"
)

// Task is a part of the working day with its own noise. Its time is given by Minutes alone, by Minutes or
// nothing with a range from Low to High, or by several Durations.
type Task struct {
	Name           string
	Levels         []float64 // dB(A), one or more samples
	Minutes        float64   // time a day; 0 = the middle of the range or the mean of the durations
	Low, High      float64   // minutes, the least and the longest time; both 0 = no range
	Durations      []float64 // minutes, times found on several days or by several people
	ShortestSample float64   // minutes of the shortest sample; 0 = not on record
}

// TaskShare is what a task adds to a daily exposure level and its uncertainty.
type TaskShare struct {
	Name           string
	Samples        int
	Level          float64 // dB(A), energy mean of the samples
	Spread         float64 // dB from the lowest sample to the highest
	Minutes        float64 // time a day
	ShortestSample float64 // minutes; 0 = not on record
	Contribution   float64 // dB(A), L + 10 lg(T/8 h)
	U1a            float64 // dB, standard error of the samples; 0 for one sample
	U1b            float64 // hours, uncertainty of the time; 0 for a single time
	C1a            float64 // sensitivity of the daily level to the level, no unit
	C1b            float64 // sensitivity of the daily level to the time, dB per hour
}

// TaskResult is a daily exposure level found by the task-based strategy.
type TaskResult struct {
	Tasks      []TaskShare
	LEX        float64 // dB(A), daily exposure level L_EX,8h, not rounded
	Instrument Instrument
	U2, U3     float64 // dB, of the instrument and of the place of the microphone
	Standard   float64 // dB, combined standard uncertainty u
	Expanded   float64 // dB, U = 1.65 u, one-sided 95 %
}

// TaskBased gives the daily exposure level and its uncertainty from the tasks of a day (ISO 9612:2009
// clause 9 and Annex C.3, seen in a secondary source): 10 lg of the sum of (T/8 h) * 10^(L/10), and u² = sum
// of c1a² (u1a² + u2² + u3²) + (c1b u1b)². Nothing is rounded on the way.
//
// It fails if there are no tasks, if a task has no samples or one without a level, if its time is missing,
// not above 0, outside its range or given twice, if the tasks last more than 24 hours together, or if the
// instrument is unknown.
func TaskBased(tasks []Task, instrument Instrument) (TaskResult, error) {
	u2, ok := instrument.Uncertainty()
	if !ok {
		return TaskResult{}, fmt.Errorf("the uncertainty of an instrument of the kind %q is not known", instrument)
	}
	if len(tasks) == 0 {
		return TaskResult{}, fmt.Errorf("there are no tasks, so there is no exposure level")
	}
	r := TaskResult{Tasks: make([]TaskShare, len(tasks)), Instrument: instrument, U2: u2, U3: microphoneUncertainty}
	var total float64
	top := math.Inf(-1)
	for i := range tasks {
		share, err := tasks[i].share()
		if err != nil {
			return TaskResult{}, fmt.Errorf("%s %w", taskLabel(tasks[i].Name, i), err)
		}
		r.Tasks[i] = share
		total += share.Minutes
		top = max(top, share.Contribution)
	}
	if total > dayMinutes+timeSlack {
		return TaskResult{}, fmt.Errorf("the tasks last %g minutes together; a day has 1440", total)
	}
	var sum float64
	for i := range r.Tasks {
		sum += energyRatio(r.Tasks[i].Contribution, top)
	}
	r.LEX = top + 10*math.Log10(sum)
	r.combine()
	return r, nil
}

// combine works out the sensitivities and the uncertainty.
func (r *TaskResult) combine() {
	var variance float64
	for i := range r.Tasks {
		t := &r.Tasks[i]
		t.C1a = energyRatio(t.Contribution, r.LEX)
		t.C1b = timeSensitivity * t.C1a / (t.Minutes / 60)
		variance += t.C1a*t.C1a*(t.U1a*t.U1a+r.U2*r.U2+r.U3*r.U3) + t.C1b*t.C1b*t.U1b*t.U1b
	}
	r.Standard = math.Sqrt(variance)
	r.Expanded = coverage * r.Standard
}

// share works out what depends on the task alone.
func (t *Task) share() (TaskShare, error) {
	if len(t.Levels) == 0 {
		return TaskShare{}, fmt.Errorf("has no samples")
	}
	level, ok := EnergyMean(t.Levels)
	if !ok {
		return TaskShare{}, fmt.Errorf("has a sample without a level")
	}
	minutes, u1b, err := t.time()
	if err != nil {
		return TaskShare{}, err
	}
	contribution, ok := LEX8h(level, minutes)
	if !ok {
		return TaskShare{}, fmt.Errorf("lasts %g minutes, which is not above 0 and at most 24 hours", minutes)
	}
	s := TaskShare{
		Name: t.Name, Samples: len(t.Levels), Level: level, Spread: spread(t.Levels), Minutes: minutes,
		ShortestSample: t.ShortestSample, Contribution: contribution, U1b: u1b / 60,
	}
	if n := float64(len(t.Levels)); n > 1 {
		s.U1a = math.Sqrt(squares(t.Levels) / (n * (n - 1)))
	}
	return s, nil
}

// time gives the time of a task and its standard uncertainty u1b, both in minutes: the standard error of
// several durations, or half of a range.
func (t *Task) time() (minutes, u1b float64, err error) {
	ranged := t.Low != 0 || t.High != 0
	switch {
	case len(t.Durations) > 0 && (ranged || t.Minutes != 0):
		return 0, 0, fmt.Errorf("has its time given in more than one way")
	case len(t.Durations) > 0:
		for _, d := range t.Durations {
			if !finite(d) || d < 0 {
				return 0, 0, fmt.Errorf("has a duration that is negative or missing")
			}
		}
		if n := float64(len(t.Durations)); n > 1 {
			u1b = math.Sqrt(squares(t.Durations) / (n * (n - 1)))
		}
		return arithmeticMean(t.Durations), u1b, nil
	case !ranged:
		return t.Minutes, 0, nil
	}
	minutes = t.Minutes
	if minutes == 0 {
		minutes = (t.Low + t.High) / 2
	}
	if !(t.Low >= 0 && t.Low <= minutes && minutes <= t.High) {
		return 0, 0, fmt.Errorf("lasts %g minutes, which is not within its range from %g to %g", minutes, t.Low, t.High)
	}
	return minutes, (t.High - t.Low) / 2, nil
}

func taskLabel(name string, i int) string {
	if name == "" {
		return fmt.Sprintf("task %d", i+1)
	}
	return fmt.Sprintf("task %q", name)
}

// Working shows the formulas of the result with their numbers, one line a step.
func (r TaskResult) Working() []string {
	lines := make([]string, 0, 2*len(r.Tasks)+3)
	for i, t := range r.Tasks {
		hours := number(t.Minutes / 60)
		lines = append(lines,
			fmt.Sprintf("%s: L = %.2f dB(A) from %s, %.2f + 10 lg(%s h / 8 h) = %.2f dB(A)",
				taskLabel(t.Name, i), t.Level, samples(t.Samples), t.Level, hours, t.Contribution),
			fmt.Sprintf("%s: c1a = 10^((%.2f - %.2f)/10) = %.4f, u1a = %.4f dB, c1b = %s · %.4f / %s h = %.4f dB/h, u1b = %s h",
				taskLabel(t.Name, i), t.Contribution, r.LEX, t.C1a, t.U1a, number(timeSensitivity), t.C1a, hours, t.C1b, number(t.U1b)))
	}
	return append(lines,
		fmt.Sprintf("L_EX,8h = 10 lg of the sum of 10^(contribution/10) = %.2f dB(A)", r.LEX),
		fmt.Sprintf("u² = sum of c1a² · (u1a² + %s² + %s²) + (c1b · u1b)² = %.4f, u = %.4f dB", number(r.U2), number(r.U3), r.Standard*r.Standard, r.Standard),
		fmt.Sprintf("U = %s · %.4f = %.2f dB", number(coverage), r.Standard, r.Expanded))
}
