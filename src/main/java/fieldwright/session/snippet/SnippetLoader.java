package fieldwright.session.snippet;

/**
 * Defines snippet classes from their bytes when they are first needed. Each loader has classes, and so static fields,
 * of its own: two loaders are two independent workings of the same sheet.
 */
final class SnippetLoader extends ClassLoader {
    private final ClassStore store;

    SnippetLoader(ClassStore store) {
        super(SnippetLoader.class.getClassLoader());
        this.store = store;
    }

    @Override
    protected Class<?> findClass(String name) throws ClassNotFoundException {
        byte[] bytes = store.bytes(name);
        if (bytes == null) {
            throw new ClassNotFoundException(name);
        }
        return defineClass(name, bytes, 0, bytes.length);
    }
}
