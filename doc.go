// Package onecusp is the front page of the library; the work is done in the
// rooms below it.
package onecusp
