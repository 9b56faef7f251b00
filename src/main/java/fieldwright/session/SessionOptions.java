package fieldwright.session;

import java.time.Duration;

/**
 * How the calculation process is set up.
 *
 * @param heapMegabytes largest heap of the process
 * @param patience      how long after a stop request the process may go on before it is killed
 */
public record SessionOptions(int heapMegabytes, Duration patience) {

    public static final SessionOptions STANDARD = new SessionOptions(1024, Duration.ofSeconds(1));

    public SessionOptions {
        if (heapMegabytes < 64) {
            throw new IllegalArgumentException("heap of the calculation process = " + heapMegabytes + " MB: give at least 64.");
        }
        if (patience.isNegative()) {
            throw new IllegalArgumentException("patience after a stop = " + patience + ": must be >= 0.");
        }
    }
}
