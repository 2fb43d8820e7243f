package iridepth.reading;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.ForkJoinTask;
import java.util.concurrent.atomic.AtomicReference;
import java.util.function.IntConsumer;

/** Jobs to be done at the same time on all processors, none of which may depend on another. */
final class Crew {
    private final List<ForkJoinTask<?>> jobs = new ArrayList<>();
    private final AtomicReference<RuntimeException> failure = new AtomicReference<>();

    /** Adds a job. */
    void add(Runnable job) {
        jobs.add(ForkJoinTask.adapt(() -> {
            try {
                job.run();
            } catch (RuntimeException e) {
                failure.compareAndSet(null, e);
            }
        }));
    }

    /** Adds a job for every so many of a range of numbers. */
    void add(int from, int to, int numbers, IntConsumer job) {
        for (int start = from; start < to; start += numbers) {
            int first = start;
            int end = Math.min(to, start + numbers);
            add(() -> {
                for (int i = first; i < end; i++) {
                    job.accept(i);
                }
            });
        }
    }

    /**
     * Does them all. A failure of one is thrown as it is, not wrapped as the pool would.
     */
    void work() {
        ForkJoinTask.invokeAll(jobs);
        jobs.clear();
        if (failure.get() != null) {
            throw failure.get();
        }
    }
}
