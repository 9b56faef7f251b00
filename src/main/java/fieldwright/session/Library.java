package fieldwright.session;

import fieldwright.field.Accuracy;
import fieldwright.formula.Binding;
import fieldwright.integral.NestedIntegrator;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.quantity.AuthorException;
import fieldwright.sheet.Cell;
import fieldwright.sheet.Digest;
import fieldwright.sheet.Sheet;
import fieldwright.sheet.SheetException;
import fieldwright.words.Desk;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;

/**
 * A library sheet: the derive lines of a sheet on the class path under {@code fieldwright/stdlib}, for use in others as
 * {@code closedForms.E_ring(…)}.
 *
 * @param name   as in the header of the sheet that uses it, {@code closed-forms}
 * @param digest of its text
 * @param names  what it defines, each with the library's name before it, as names of no cell (0)
 */
record Library(String name, String digest, List<SheetName> names) {
    private static final String FOLDER = "/fieldwright/stdlib/";
    private static final Map<String, Library> KNOWN = new ConcurrentHashMap<>();

    Library {
        names = List.copyOf(names);
    }

    /** @throws AuthorException when there is no such library sheet, or it has an error */
    static Library named(String name) {
        return KNOWN.computeIfAbsent(name, Library::read);
    }

    private static Library read(String name) {
        String text = text(name);
        Sheet sheet;
        try {
            sheet = Sheet.parse(text);
        } catch (SheetException e) {
            throw faulty(name, "line " + e.line() + ": " + e.getMessage());
        }
        NameTable table = new NameTable();
        for (int number = 1; number <= sheet.cells().size(); number++) {
            CellRun run = work(sheet.cells().get(number - 1), number, table);
            if (run.state() != CellOutcome.State.WORKED) {
                throw faulty(name, run.outputs().stream().filter(Output.Problem.class::isInstance).findFirst()
                        .map(problem -> ((Output.Problem) problem).text()).orElse("cell " + number));
            }
            run.writes().values().forEach(table::put);
        }
        return new Library(name, Digest.of(text), exported(javaName(name), table));
    }

    private static AuthorException faulty(String name, String error) {
        return new AuthorException("library sheet '" + name + "' has an error: " + error);
    }

    private static String text(String name) {
        try (InputStream in = name.matches("[a-z0-9-]+") ? Library.class.getResourceAsStream(FOLDER + name + ".fws") : null) {
            if (in == null) {
                throw new AuthorException("use: there is no library sheet '" + name + "'. Correct its name, or take it out of the line.");
            }
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new UncheckedIOException("library sheet " + name, e);
        }
    }

    private static CellRun work(Cell cell, int number, NameTable above) {
        Draft draft = new Draft(number, cell, above, new NestedIntegrator(), name -> null);
        switch (cell.kind()) {
            case NOTE -> { }
            case INPUT -> new InputCell(draft, new Setting(Accuracy.DEFAULT, Desk.Mode.WORKING, List.of(), Map.of())).work();
            case DERIVE -> new DeriveCell(draft, Desk.Mode.WORKING).work();
            case WORKING -> draft.fail(cell.headLine(), "a library sheet has notes, inputs and derive lines, no working cells.");
        }
        return draft.finished();
    }

    private static List<SheetName> exported(String prefix, NameTable table) {
        List<SheetName> names = new ArrayList<>();
        names.add(new SheetName(prefix, 0, null, new Binding.Unfit("a library sheet", "Write " + prefix + ".NAME."), null, null));
        for (SheetName name : table.all()) {
            names.add(new SheetName(prefix + "." + name.name(), 0, name.value(), name.binding(), null, null));
        }
        return names;
    }

    /** {@code closedForms} of {@code closed-forms}. */
    String javaName() {
        return javaName(name);
    }

    private static String javaName(String name) {
        StringBuilder camel = new StringBuilder();
        for (String part : name.split("-")) {
            camel.append(camel.isEmpty() || part.isEmpty() ? part : Character.toUpperCase(part.charAt(0)) + part.substring(1));
        }
        return camel.toString();
    }

    /**
     * A class by which Java code calls its formulas: {@code closedForms.E_ring(Q, a, z)}, and {@code closedForms.value("k")}
     * for its numbers.
     */
    String javaSource() {
        StringBuilder methods = new StringBuilder();
        for (SheetName name : names) {
            String call = name.name();
            if (name.binding() instanceof Binding.Definition definition && !definition.parameters().isEmpty()) {
                methods.append("    static Amount ").append(call.substring(call.indexOf('.') + 1))
                        .append("(Object... arguments) { return fieldwright.session.LibraryCall.of(\"").append(call).append("\", arguments); }\n");
            } else if (name.binding() instanceof Binding.Value) {
                methods.append("    static Amount ").append(call.substring(call.indexOf('.') + 1))
                        .append("() { return fieldwright.session.LibraryCall.of(\"").append(call).append("\"); }\n");
            }
        }
        return "class " + javaName() + " {\n" + methods + "}";
    }

    /** The class of each library by its Java name. */
    static Map<String, String> javaSources(List<Library> libraries) {
        Map<String, String> sources = new LinkedHashMap<>();
        libraries.forEach(library -> sources.put(library.javaName(), library.javaSource()));
        return sources;
    }
}
