package fieldwright.sheet;

import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

/** Names a text by its SHA-256, 64 hexadecimal digits, the same with either line end and with or without a byte order mark. */
public final class Digest {

    private Digest() { }

    public static String of(String text) {
        String plain = text.startsWith(Sheet.BYTE_ORDER_MARK) ? text.substring(1) : text;
        String normal = plain.replace("\r\n", "\n");
        try {
            byte[] digest = MessageDigest.getInstance("SHA-256").digest(normal.getBytes(StandardCharsets.UTF_8));
            return HexFormat.of().formatHex(digest);
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java has SHA-256", e);
        }
    }
}
