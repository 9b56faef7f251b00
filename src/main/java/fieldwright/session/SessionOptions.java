package fieldwright.session;

import java.time.Duration;

/**
 * How the calculation process is set up.
 *
 * @param heapMegabytes largest heap of the process
 * @param patience      how long after a stop request the process may go on before it is killed
 * @param brief         true for a process that works one sheet and ends: Java's second compiler stays out of it. The
 *                      shipped silo sheet then takes half the processor time (4.8 s for 8.5 s on 17), while numbers that
 *                      are worked for long take 1.8 times as long. The numbers are the same.
 */
public record SessionOptions(int heapMegabytes, Duration patience, boolean brief) {

    public static final SessionOptions STANDARD = new SessionOptions(1024, Duration.ofSeconds(1), false);
    public static final SessionOptions BRIEF = new SessionOptions(1024, Duration.ofSeconds(1), true);

    public SessionOptions {
        if (heapMegabytes < 64) {
            throw new IllegalArgumentException("heap of the calculation process = " + heapMegabytes + " MB: give at least 64.");
        }
        if (patience.isNegative()) {
            throw new IllegalArgumentException("patience after a stop = " + patience + ": must be >= 0.");
        }
    }
}
