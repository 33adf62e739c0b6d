package sparse

// buckets are first-in first-out queues of unknowns by degree.
type buckets struct {
	head, tail []int32 // by degree, -1 when empty
	next, prev []int32
	deg        []int32
	low        int32 // no queue below it holds anything
}

func newBuckets(n int) *buckets {
	b := &buckets{head: make([]int32, n+1), tail: make([]int32, n+1), next: make([]int32, n), prev: make([]int32, n), deg: make([]int32, n)}
	for d := range b.head {
		b.head[d], b.tail[d] = -1, -1
	}
	return b
}

func (b *buckets) push(i, degree int32) {
	b.deg[i], b.next[i], b.prev[i] = degree, -1, b.tail[degree]
	if t := b.tail[degree]; t >= 0 {
		b.next[t] = i
	} else {
		b.head[degree] = i
	}
	b.tail[degree] = i
	b.low = min(b.low, degree)
}

func (b *buckets) remove(i int32) {
	d, p, q := b.deg[i], b.prev[i], b.next[i]
	if p >= 0 {
		b.next[p] = q
	} else {
		b.head[d] = q
	}
	if q >= 0 {
		b.prev[q] = p
	} else {
		b.tail[d] = p
	}
}

func (b *buckets) popMin() int32 {
	for b.head[b.low] < 0 {
		b.low++
	}
	i := b.head[b.low]
	b.remove(i)
	return i
}
