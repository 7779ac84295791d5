package org.laddergate.inmemory;

import java.util.List;
import java.util.Optional;
import java.util.concurrent.ConcurrentSkipListMap;
import org.laddergate.limits.Product;
import org.laddergate.limits.ProductStore;

public final class InMemoryProducts implements ProductStore {
    private final ConcurrentSkipListMap<String, Product> products = new ConcurrentSkipListMap<>();

    @Override
    public Optional<Product> find(String name) {
        return Optional.ofNullable(products.get(name));
    }

    @Override
    public List<String> names() {
        return List.copyOf(products.keySet());
    }

    @Override
    public void save(Product product) {
        products.put(product.name(), product);
    }
}
