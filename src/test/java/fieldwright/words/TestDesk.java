package fieldwright.words;

import fieldwright.field.Accuracy;
import fieldwright.formula.Binding;
import fieldwright.formula.Formula;
import fieldwright.formula.Integrator;
import fieldwright.formula.Parameter;
import fieldwright.formula.Scope;
import fieldwright.integral.NestedIntegrator;
import fieldwright.output.Output;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;

/** A desk with a few names of a sheet, for tests of the words. */
final class TestDesk extends Desk implements Scope {
    final Map<String, Binding> names = new LinkedHashMap<>();
    final List<Output> outputs = new ArrayList<>();
    final Map<String, Object> results = new LinkedHashMap<>();
    Mode mode = Mode.WORKING;

    TestDesk() {
        value("R_s", 1.8, "m");
        value("H", 4, "m");
        value("rho_0", 2.1, "uC/m^3");
        value("sigma_0", 5, "uC/m^2");
        value("lambda", 3, "nC/m");
        value("k", 0.6, "");
        names.put("fall", new Binding.Definition(List.of(), Formula.parse("rho_0*(1 - k*(rho/R_s)^2)").bind(this), null));
        names.put("rho_v", new Binding.Definition(List.of(new Parameter("s", Units.LENGTH)),
                Formula.parse("rho_0*(1 - k*(s/R_s)^2)").bind(this, java.util.Set.of("s")), null));
    }

    void value(String name, double value, String unit) {
        names.put(name, new Binding.Value(Amount.of(value, unit)));
    }

    <T> T work(Callable<T> cell) {
        try {
            return Desk.at(this, cell);
        } catch (RuntimeException e) {
            throw e;
        } catch (Exception e) {
            throw new IllegalStateException(e);
        }
    }

    <T extends Output> List<T> shown(Class<T> type) {
        return outputs.stream().filter(type::isInstance).map(type::cast).toList();
    }

    @Override
    public Scope scope() {
        return this;
    }

    @Override
    public Accuracy accuracy() {
        return Accuracy.DEFAULT;
    }

    @Override
    public Mode mode() {
        return mode;
    }

    @Override
    public void show(Output output) {
        outputs.add(output);
    }

    @Override
    public void result(String name, Object value) {
        results.put(name, value);
    }

    @Override
    public Binding lookup(String name) {
        return names.get(name);
    }

    @Override
    public Collection<String> names() {
        return names.keySet();
    }

    @Override
    public Integrator integrator() {
        return new NestedIntegrator();
    }
}
