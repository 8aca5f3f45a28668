package acoustics

import "fmt"

const (
	wideSpread    = 3.0 // dB between samples from which more of them are needed (ISO 9612:2009 9.3 and 11.3, secondary source)
	taskSamples   = 3   // samples of a task (9.3, secondary source)
	moreSamples   = 3   // further samples of a task with a wide spread (from memory)
	taskSampleMin = 5.0 // minutes of a sample of a task (9.3, from memory)
	jobSamples    = 5   // samples of a job (10.3, secondary source)
	fullDays      = 3   // days (11.3, secondary source)
	moreDays      = 2   // further days with a wide spread (11.3, secondary source)
	worstC1U1     = 3.5 // dB above which the plan is to be revised (10.4, secondary source)
)

// MinimumSampling gives the least time in minutes that all samples of the job-based strategy must last
// together for a group of so many workers: 5 h up to 5 workers, half an hour more for each up to 15, a
// quarter up to 40 (ISO 9612:2009 Table 1, secondary source). Above 40 it gives 17 h, and split says that
// the group may be split instead. It returns false if there are no workers.
func MinimumSampling(workers int) (minutes float64, split, ok bool) {
	switch {
	case workers < 1:
		return 0, false, false
	case workers <= 5:
		return 5 * 60, false, true
	case workers <= 15:
		return 5*60 + 30*float64(workers-5), false, true
	case workers <= 40:
		return 10*60 + 15*float64(workers-15), false, true
	}
	return 17 * 60, true, true
}

// PlanFaults lists what ISO 9612:2009 finds wanting in the sampling behind a task-based result, a sentence
// each. A sample of unknown length is not judged.
func (r TaskResult) PlanFaults() []string {
	var faults []string
	for i, t := range r.Tasks {
		name := taskLabel(t.Name, i)
		if t.Samples < taskSamples {
			faults = append(faults, fmt.Sprintf("%s has %s; at least %d are needed", name, samples(t.Samples), taskSamples))
		}
		if wide(t.Spread) && t.Samples >= taskSamples && t.Samples < taskSamples+moreSamples {
			faults = append(faults, fmt.Sprintf("the samples of %s lie %.1f dB apart; take at least %d more, measure longer or split the task",
				name, t.Spread, taskSamples+moreSamples-t.Samples))
		}
		if t.ShortestSample > 0 && t.ShortestSample < min(taskSampleMin, t.Minutes) {
			faults = append(faults, fmt.Sprintf("a sample of %s lasts %g minutes; it should last %g or the whole task", name, t.ShortestSample, taskSampleMin))
		}
	}
	return faults
}

// PlanFaults lists what ISO 9612:2009 finds wanting in the sampling behind a job-based or full-day result, a
// sentence each. For the job-based strategy it needs the number of workers in the group and the minutes that
// all samples last together; 0 means that they are not on record, and gives a sentence too.
func (r SampledResult) PlanFaults(workers int, sampledMinutes float64) []string {
	var faults []string
	switch {
	case r.Strategy == JobBased:
		if r.Samples < jobSamples {
			faults = append(faults, fmt.Sprintf("there are %s; the job-based strategy needs at least %d", samples(r.Samples), jobSamples))
		}
		faults = append(faults, timeFaults(workers, sampledMinutes)...)
	case wide(r.Spread) && r.Samples < fullDays+moreDays:
		faults = append(faults, fmt.Sprintf("the days lie %.1f dB apart; measure at least %d more", r.Spread, fullDays+moreDays-r.Samples))
	}
	if r.C1U1 > worstC1U1+levelSlack {
		faults = append(faults, fmt.Sprintf("the sampling alone has an uncertainty of %.1f dB, above %.1f dB; take more samples or form other groups", r.C1U1, worstC1U1))
	}
	if r.Clamped {
		faults = append(faults, fmt.Sprintf("%s with a standard deviation of %.1f dB lie outside Table C.4, so the uncertainty is rough", samples(r.Samples), r.U1))
	}
	return faults
}

func timeFaults(workers int, sampledMinutes float64) []string {
	least, split, ok := MinimumSampling(workers)
	if !ok {
		return []string{"the number of workers in the group is not known, so the sampling time cannot be checked"}
	}
	if !(sampledMinutes > 0) {
		return []string{"the length of the samples is not known, so the sampling time cannot be checked"}
	}
	if sampledMinutes >= least-timeSlack {
		return nil
	}
	if split {
		return []string{fmt.Sprintf("the samples last %s h together; a group of %d needs at least %s h or has to be split", number(sampledMinutes/60), workers, number(least/60))}
	}
	return []string{fmt.Sprintf("the samples last %s h together; a group of %d needs at least %s h", number(sampledMinutes/60), workers, number(least/60))}
}

func wide(spread float64) bool {
	return spread >= wideSpread-levelSlack
}

func samples(n int) string {
	if n == 1 {
		return "1 sample"
	}
	return fmt.Sprintf("%d samples", n)
}
