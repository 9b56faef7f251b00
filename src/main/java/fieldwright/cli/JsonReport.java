package fieldwright.cli;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.output.Value;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;

/**
 * A run as one JSON object: {@code results checks assessments cautions assumptions errors}. Numbers in SI; null where
 * there is no number, where a numerical error was not carried or a tolerance not established.
 */
final class JsonReport {

    private JsonReport() { }

    static String of(RunOutcome run) {
        return JsonWriter.write(object(
                "results", each(run, Output.Result.class, JsonReport::result),
                "checks", each(run, Output.Check.class, JsonReport::check),
                "assessments", each(run, Output.Assessment.class, JsonReport::assessment),
                "cautions", each(run, Output.Caution.class, caution -> object("text", caution.text(), "source", caution.source())),
                "assumptions", each(run, Output.Assumption.class, assumption -> object("text", assumption.text())),
                "errors", run.problems().stream().map(JsonReport::error).toList()));
    }

    private static <T extends Output> List<Map<String, Object>> each(RunOutcome run, Class<T> type, Function<T, Map<String, Object>> describe) {
        List<Map<String, Object>> all = new ArrayList<>();
        for (CellOutcome cell : run.cells()) {
            for (T output : cell.all(type)) {
                Map<String, Object> entry = object("cell", cell.cell());
                entry.putAll(describe.apply(output));
                all.add(entry);
            }
        }
        return all;
    }

    private static Map<String, Object> result(Output.Result result) {
        Value value = result.value();
        Map<String, Object> entry = object("name", result.name(), "status", value.status().word());
        if (value instanceof Value.Sides sides) {
            entry.put("unit", value.unit());
            entry.put("sides", List.of(side(sides.plusSide(), sides.plus()), side(sides.minusSide(), sides.minus())));
        } else {
            entry.putAll(numbers(value));
        }
        if (!value.reason().isEmpty()) {
            entry.put("reason", value.reason());
        }
        return entry;
    }

    private static Map<String, Object> side(String name, Value.Triple triple) {
        Map<String, Object> entry = object("side", name, "status", triple.status().word());
        entry.putAll(numbers(triple));
        return entry;
    }

    /** {@code value unit numericalError tolerance}, and the place of a vector that has one. */
    private static Map<String, Object> numbers(Value value) {
        if (value instanceof Value.Triple vector) {
            List<Value.Scalar> parts = List.of(vector.x(), vector.y(), vector.z());
            Map<String, Object> entry = object("value", list(parts, Value.Scalar::value), "unit", vector.unit(),
                    "numericalError", list(parts, Value.Scalar::numericalError), "tolerance", list(parts, Value.Scalar::tolerance));
            if (vector.place() != null) {
                entry.put("place", List.of(vector.place().x(), vector.place().y(), vector.place().z()));
            }
            return entry;
        }
        Value.Scalar number = (Value.Scalar) value;
        return object("value", number.value(), "unit", number.unit(), "numericalError", number.numericalError(),
                "tolerance", number.tolerance());
    }

    private static List<Double> list(List<Value.Scalar> parts, Function<Value.Scalar, Double> number) {
        List<Double> numbers = new ArrayList<>();
        parts.forEach(part -> numbers.add(number.apply(part)));
        return numbers;
    }

    private static Map<String, Object> check(Output.Check check) {
        return object("label", check.label(), "passed", check.passed(), "measured", check.measured(), "allowed", check.allowed(),
                "unit", check.unit(), "detail", check.detail());
    }

    private static Map<String, Object> assessment(Output.Assessment assessment) {
        Value.Scalar worst = assessment.worstCase();
        return object("label", assessment.label(), "passed", assessment.passed(), "status", assessment.status().word(),
                "value", assessment.value().value(), "unit", assessment.value().unit(),
                "numericalError", assessment.value().numericalError(), "tolerance", assessment.value().tolerance(),
                "worstCase", worst == null ? null : worst.value(), "threshold", assessment.threshold().value(),
                "marginAsked", assessment.marginAsked(), "marginFound", assessment.marginFound(),
                "source", assessment.source(), "caution", assessment.caution());
    }

    private static Map<String, Object> error(Output.Problem problem) {
        return object("line", problem.line() > 0 ? problem.line() : null, "cell", problem.cell() > 0 ? problem.cell() : null,
                "message", problem.message());
    }

    private static Map<String, Object> object(Object... namesAndValues) {
        Map<String, Object> object = new LinkedHashMap<>();
        for (int i = 0; i < namesAndValues.length; i += 2) {
            object.put((String) namesAndValues[i], namesAndValues[i + 1]);
        }
        return object;
    }
}
