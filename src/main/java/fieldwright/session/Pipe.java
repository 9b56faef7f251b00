package fieldwright.session;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.Closeable;
import java.io.DataInputStream;
import java.io.DataOutputStream;
import java.io.EOFException;
import java.io.IOException;
import java.io.InputStream;
import java.io.InvalidClassException;
import java.io.ObjectInputFilter;
import java.io.ObjectInputStream;
import java.io.ObjectOutputStream;
import java.io.OutputStream;
import java.io.Serializable;
import java.io.StreamCorruptedException;
import java.util.Set;

/**
 * Messages over a pair of byte streams. A frame is a mark, the length of a message and the message serialised; each
 * stands by itself. What comes in may consist of our own message and output records and of plain Java values and
 * collections, and of nothing else.
 *
 * <p>Any thread may send; one thread receives.
 */
final class Pipe implements Closeable {
    private static final int MARK = 0x46776B31;
    private static final int LARGEST = 1 << 28;
    private static final Set<String> PACKAGES = Set.of("fieldwright.output", "fieldwright.session", "java.lang", "java.util");

    private final DataInputStream in;
    private final DataOutputStream out;

    Pipe(InputStream in, OutputStream out) {
        this.in = new DataInputStream(in);
        this.out = new DataOutputStream(out);
    }

    void send(Serializable message) throws IOException {
        ByteArrayOutputStream bytes = new ByteArrayOutputStream(1024);
        try (ObjectOutputStream objects = new ObjectOutputStream(bytes)) {
            objects.writeObject(message);
        }
        synchronized (out) {
            out.writeInt(MARK);
            out.writeInt(bytes.size());
            bytes.writeTo(out);
            out.flush();
        }
    }

    /**
     * The next message.
     *
     * @throws EOFException when the other side has closed
     * @throws IOException  when what comes is no message of ours; nothing more can be received then
     */
    <T extends Serializable> T receive(Class<T> type) throws IOException {
        int mark = in.readInt();
        int length = in.readInt();
        if (mark != MARK || length < 0 || length > LARGEST) {
            throw new StreamCorruptedException("something else than messages came through the pipe");
        }
        byte[] bytes = in.readNBytes(length);
        if (bytes.length < length) {
            throw new EOFException("the pipe was closed within a message");
        }
        try (ObjectInputStream objects = new ObjectInputStream(new ByteArrayInputStream(bytes))) {
            objects.setObjectInputFilter(Pipe::allow);
            return type.cast(objects.readObject());
        } catch (ClassNotFoundException | ClassCastException e) {
            throw new InvalidClassException("no message of ours: " + e.getMessage());
        }
    }

    private static ObjectInputFilter.Status allow(ObjectInputFilter.FilterInfo info) {
        Class<?> type = info.serialClass();
        if (type == null) {
            return ObjectInputFilter.Status.UNDECIDED;
        }
        while (type.isArray()) {
            type = type.getComponentType();
        }
        boolean known = type.isPrimitive() || PACKAGES.contains(type.getPackageName());
        return known ? ObjectInputFilter.Status.ALLOWED : ObjectInputFilter.Status.REJECTED;
    }

    @Override
    public void close() throws IOException {
        out.close();
        in.close();
    }
}
