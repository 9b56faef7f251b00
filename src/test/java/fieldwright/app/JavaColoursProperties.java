package fieldwright.app;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.stream.Collectors;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Example;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;

class JavaColoursProperties {
    @Provide
    Arbitrary<String> javaLike() {
        return Arbitraries.of("var", " ", "x", "\"", "\\", "'", "//", "/*", "*/", "\n", "1e-9", "\"\"\"", "1.5", "(", ")", ";", "rho_0", "new")
                .list().ofMaxSize(30).map(parts -> String.join("", parts));
    }

    @Property(seed = "20261201", tries = 2000)
    void everyLetterIsInExactlyOneRun(@ForAll("javaLike") String java) {
        assertEquals(java, JavaColours.of(java).stream().map(JavaColours.Run::text).collect(Collectors.joining()));
    }

    @Example
    void kinds() {
        List<JavaColours.Run> runs = JavaColours.of("var a = f(\"x*(1 - \\\"k)\", 2.5e-3); // note \"here\"");
        assertEquals("code-keyword code-plain code-string code-plain code-number code-plain code-comment",
                runs.stream().map(JavaColours.Run::style).collect(Collectors.joining(" ")));
        assertEquals("\"x*(1 - \\\"k)\"", runs.get(2).text());
    }
}
