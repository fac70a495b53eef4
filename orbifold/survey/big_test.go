package survey

import (
	"context"
	"fmt"
	"os"
	"strconv"
	"testing"
	"time"

	"example.com/onecusp/orbifold"
)

func TestBig(t *testing.T) {
	d, _ := strconv.Atoi(os.Getenv("BIG"))
	if d == 0 { return }
	m, _ := strconv.Atoi(os.Getenv("MEM"))
	var k [3]int64
	fmt.Sscanf(os.Getenv("WEIGHTS"), "%d,%d,%d", &k[0],&k[1],&k[2])
	start := time.Now()
	r, err := Distinct(context.Background(), orbifold.MustNew(k[0],k[1],k[2]), PowerOfTen(d), Options{MemoryBytes: int64(m)<<20, Progress: func(p Progress){ fmt.Fprintf(os.Stderr, "%+v\n", p) }})
	t.Log(r, err, time.Since(start))
}
