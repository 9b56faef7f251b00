package fieldwright.formula;

import fieldwright.quantity.Amount;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** Names for tests. */
class TestScope implements Scope {
    private final Map<String, Binding> bindings = new LinkedHashMap<>();
    private Integrator integrator;

    TestScope value(String name, double value, String unit) {
        bindings.put(name, new Binding.Value(Amount.of(value, unit)));
        return this;
    }

    TestScope value(String name, Amount value) {
        bindings.put(name, new Binding.Value(value));
        return this;
    }

    /** @param parameters "z: m, a: m", or "" */
    TestScope define(String name, String parameters, String body, String condition) {
        List<Parameter> list = new ArrayList<>();
        for (String p : parameters.isEmpty() ? new String[0] : parameters.split(",")) {
            list.add(new Parameter(p.split(":")[0].strip(), Units.parse(p.split(":")[1]).dimension()));
        }
        bindings.put(name, new Binding.Definition(list, Formula.parse(body), condition == null ? null : Formula.parseCondition(condition)));
        return this;
    }

    TestScope with(Integrator i) {
        integrator = i;
        return this;
    }

    @Override
    public Binding lookup(String name) {
        return bindings.get(name);
    }

    @Override
    public Collection<String> names() {
        return bindings.keySet();
    }

    @Override
    public Integrator integrator() {
        return integrator;
    }
}
