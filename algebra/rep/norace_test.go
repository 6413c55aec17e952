//go:build !race

package rep_test

const raceDetector = false
