package fieldwright;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/** The folders are the architecture: what each may use is written here once and held. */
class ArchitectureTest {
    /** Folder to the folders it may use. A folder that is not listed may not exist. */
    private static final Map<String, Set<String>> MAY_USE = Map.ofEntries(
            Map.entry("quantity", Set.of()),
            Map.entry("formula", Set.of("quantity")),
            Map.entry("geometry", Set.of("quantity", "formula")),
            Map.entry("charge", Set.of("quantity", "formula", "geometry")),
            Map.entry("integral", Set.of("quantity", "formula", "geometry", "charge")),
            Map.entry("field", Set.of("quantity", "formula", "geometry", "charge", "integral")),
            Map.entry("judge", Set.of("quantity", "formula", "geometry", "charge", "integral", "field")),
            Map.entry("study", Set.of("quantity")),
            Map.entry("output", Set.of()),
            Map.entry("words", Set.of("quantity", "formula", "geometry", "charge", "integral", "field", "judge", "study",
                    "output")),
            Map.entry("sheet", Set.of("output")),
            Map.entry("session", Set.of("quantity", "formula", "geometry", "charge", "integral", "field", "judge", "study",
                    "output", "words", "sheet")),
            Map.entry("draw", Set.of("output")),
            Map.entry("app", Set.of("output", "formula", "sheet", "session", "draw")),
            Map.entry("cli", Set.of("output", "sheet", "session", "draw", "app")));
    private static final Set<String> PICTURES = Set.of("app", "draw");

    private static JavaClasses classes;

    @BeforeAll
    static void read() {
        classes = new ClassFileImporter().withImportOption(new ImportOption.DoNotIncludeTests()).importPackages("fieldwright");
    }

    @Test
    void arrowsPointOneWay() {
        Set<String> wrong = new TreeSet<>();
        for (JavaClass from : classes) {
            String folder = folder(from);
            Set<String> allowed = MAY_USE.get(folder);
            if (allowed == null) {
                wrong.add("folder '" + folder + "' is not in the plan of the house");
                continue;
            }
            from.getDirectDependenciesFromSelf().stream()
                    .map(d -> d.getTargetClass().getBaseComponentType())
                    .filter(to -> to.getPackageName().startsWith("fieldwright"))
                    .map(ArchitectureTest::folder)
                    .filter(to -> !to.equals(folder) && !allowed.contains(to))
                    .forEach(to -> wrong.add(folder + " -> " + to + " in " + from.getName()));
        }
        assertTrue(wrong.isEmpty(), () -> String.join("\n", wrong));
        assertTrue(classes.size() > 50, "the classes were found");
    }

    @Test
    void picturesStayInTheirFolders() {
        noClasses().that(outside(PICTURES))
                .should().dependOnClassesThat().resideInAnyPackage("javafx..", "java.awt..", "javax.swing..")
                .check(classes);
    }

    @Test
    void onlyTheSessionSeesJShell() {
        noClasses().that(outside(Set.of("session")))
                .should().dependOnClassesThat().resideInAnyPackage("jdk.jshell..")
                .check(classes);
    }

    private static com.tngtech.archunit.base.DescribedPredicate<JavaClass> outside(Set<String> folders) {
        return com.tngtech.archunit.base.DescribedPredicate.describe("are outside " + folders, c -> !folders.contains(folder(c)));
    }

    private static String folder(JavaClass c) {
        String[] parts = c.getPackageName().split("\\.");
        return parts.length > 1 ? parts[1] : "";
    }
}
