package fieldwright.session;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import fieldwright.output.Axis;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.RunOutcome;
import fieldwright.output.Series;
import fieldwright.output.Status;
import fieldwright.output.Value;
import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.EOFException;
import java.io.IOException;
import java.io.InvalidClassException;
import java.io.OutputStream;
import java.io.Serializable;
import java.io.StreamCorruptedException;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;

class PipeTest {
    /** A class of ours that is no message. */
    private record Stranger(java.io.File file) implements Serializable { }

    private static byte[] frames(Serializable... messages) throws IOException {
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        Pipe pipe = new Pipe(new ByteArrayInputStream(new byte[0]), bytes);
        for (Serializable message : messages) {
            pipe.send(message);
        }
        return bytes.toByteArray();
    }

    private static Pipe reading(byte[] bytes) {
        return new Pipe(new ByteArrayInputStream(bytes), OutputStream.nullOutputStream());
    }

    @Test
    void everyOutputPasses() throws IOException {
        Value.Scalar one = new Value.Scalar(1.5, 1e-9, null, "V/m", null, Status.CONVERGED, "");
        Value.Triple triple = new Value.Triple(one, one, one, new Point(0, 0, 1));
        List<Output> outputs = List.of(new Output.Result("E", "E", one), new Output.Result("V", "V", triple),
                new Output.Result("S", "S", new Value.Sides("+z", triple, "-z", triple)), new Output.Typeset("f", "f = x", "f = x", "", ""),
                new Output.Given("a", "a", one, "1.5 V/m", "", ""), new Output.Table("t", List.of("a"), List.of(List.of("1")), List.of()),
                new Output.Check("c", true, "", 0, 1, ""), new Output.Assessment("a", true, one, null, one, 1, 1, "s", "c"),
                new Output.Caution("c", ""), new Output.Assumption("a"), new Output.Printed("p"), new Output.Problem(1, 1, "m"), new Output.Note("n"));
        RunOutcome outcome = new RunOutcome(List.of(new CellOutcome(1, CellOutcome.State.WORKED, outputs, Set.of("a", "b"))), List.of());
        Pipe pipe = reading(frames(new Reply.Ready(), new Reply.Done(7, outcome)));
        assertEquals(new Reply.Ready(), pipe.receive(Reply.class));
        assertEquals(new Reply.Done(7, outcome), pipe.receive(Reply.class));
        assertThrows(EOFException.class, () -> pipe.receive(Reply.class));
    }

    @Test
    void seriesKeepTheirNumbers() throws IOException {
        Series series = new Series("s", new double[] {1, 2}, new double[] {3, 4}, new double[] {0, 1e-9});
        Output.Plot plot = new Output.Plot("p", new Axis("x", "m"), new Axis("E", "V/m"), List.of(series), List.of());
        RunOutcome outcome = new RunOutcome(List.of(new CellOutcome(1, CellOutcome.State.WORKED, List.of(plot), Set.of())), List.of());
        Reply.Done done = (Reply.Done) reading(frames(new Reply.Done(1, outcome))).receive(Reply.class);
        assertArrayEquals(series.y(), done.outcome().all(Output.Plot.class).get(0).series().get(0).y());
    }

    @Test
    void otherClassesAreRefused() throws IOException {
        byte[] stranger = frames(new Stranger(new java.io.File("x")));
        assertThrows(InvalidClassException.class, () -> reading(stranger).receive(Serializable.class));
        byte[] url = frames(new java.util.ArrayList<>(List.of(java.net.URI.create("x:y"))));
        assertThrows(InvalidClassException.class, () -> reading(url).receive(Serializable.class));
        byte[] text = frames("not a reply");
        assertThrows(InvalidClassException.class, () -> reading(text).receive(Reply.class));
    }

    @Test
    void whatIsNoMessageIsRefused() throws IOException {
        assertThrows(StreamCorruptedException.class, () -> reading("Hello, this is no message".getBytes()).receive(Reply.class));
        byte[] whole = frames(new Reply.Ready());
        assertThrows(EOFException.class, () -> reading(Arrays.copyOf(whole, whole.length - 1)).receive(Reply.class));
    }
}
