package fieldwright.session.snippet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class JavaTextTest {

    @ParameterizedTest(name = "{0} declares {1}")
    @CsvSource(delimiter = '!', value = {
        "var Q = cloud.totalCharge(); ! Q",
        "Amount Q; ! Q",
        "  /* first */ final var Q = 1; // last ! Q",
        "fieldwright.quantity.Amount Q = f(); ! Q",
        "double[] a = {1, 2, 3}; ! a",
        "double a[] = {1, 2, 3}; ! a",
        "Map<String, List<Amount>> m = new HashMap<String, List<Amount>>(); ! m",
        "Map<K, V> K = null; ! K",
        "@SuppressWarnings(\"unchecked\") var x = y; ! x",
        "DoubleUnaryOperator f = x -> x * 2; ! f"
    })
    void findsTheDeclaredName(String text, String name) {
        JavaText.Declared declared = new JavaText(text).variable().orElseThrow();
        assertEquals(name, declared.name());
        assertFalse(declared.several());
        assertEquals(name, text.substring(declared.start(), declared.end()));
    }

    @ParameterizedTest(name = "{0} declares no variable")
    @CsvSource(delimiter = '!', value = {
        "x = 3;", "a[0] = 3;", "a.b = 3;", "return x;", "throw e;", "f(x);", "a.f(x);", "i++;", "int f(int x) { return x; }",
        "class K { int i; }", "record P(double x, double y) { }", "import java.util.List;", "for (int i = 0; i < 3; i++) { }",
        "do x(); while (true);", "<T> T f(T x) { return x; }", "'\"int x = 3;\";'", "// int x = 3;"
    })
    void otherTextDeclaresNone(String text) {
        assertTrue(new JavaText(text).variable().isEmpty());
    }

    @ParameterizedTest(name = "{0} declares several")
    @CsvSource(delimiter = '!', value = {"int a = 1, b = 2;", "int a, b;", "double a = f(1, 2), b = g[1];"})
    void findsSeveral(String text) {
        assertTrue(new JavaText(text).variable().orElseThrow().several());
    }

    @Test
    void namesAreFoundOutsideTextAndComments() {
        JavaText text = new JavaText("""
                var E = cloud . field("rho_0 + x", 'q', 1e-3, 0x1F, 2.5f) // comment Q
                    /* more R */ .onSide(S::t, \"""
                    block U
                    \""", u -> u + v...);""");
        assertEquals(Set.of("var", "E", "cloud", "S", "u", "v"), text.free());
        assertTrue(text.all().containsAll(Set.of("field", "onSide", "t")));
        assertFalse(text.all().contains("rho_0"));
    }

    @Test
    void ownNameIsSeenOnlyWhereItStandsByItself() {
        String text = "var Q = a.Q + \"Q\";";
        assertFalse(new JavaText(text).usesElsewhere("Q", 4));
        assertTrue(new JavaText("var Q = a + Q;").usesElsewhere("Q", 4));
        assertFalse(new JavaText("var ring = charge(ring (1));").usesElsewhere("ring", 4));
    }
}
