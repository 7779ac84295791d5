package org.laddergate.limits.files;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ConcurrentHashMap;
import java.util.stream.Stream;
import org.laddergate.limits.Product;
import org.laddergate.limits.ProductStore;

/** Product definitions as {@code <limits>/<product>/product.txt}. */
public final class ProductFiles implements ProductStore {
    private static final String FILE = "product.txt";

    private final Path root;
    private final ConcurrentHashMap<String, Product> products = new ConcurrentHashMap<>();

    /** Reads all definitions below the folder, which need not exist yet. */
    public ProductFiles(Path root) {
        this.root = root;
        if (Files.isDirectory(root)) {
            try (Stream<Path> folders = Files.list(root)) {
                folders.map(f -> f.resolve(FILE)).filter(Files::isRegularFile).forEach(this::load);
            } catch (IOException e) {
                throw new UncheckedIOException("cannot list " + root, e);
            }
        }
    }

    private void load(Path file) {
        try {
            Product product = ProductText.read(DurableFiles.read(file));
            products.put(product.name(), product);
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException(file + ": " + e.getMessage(), e);
        }
    }

    @Override
    public Optional<Product> find(String name) {
        return Optional.ofNullable(products.get(name));
    }

    @Override
    public List<String> names() {
        return products.keySet().stream().sorted().toList();
    }

    @Override
    public synchronized void save(Product product) {
        DurableFiles.write(root.resolve(product.name()).resolve(FILE), ProductText.write(product));
        products.put(product.name(), product);
    }
}
