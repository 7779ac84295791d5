package org.laddergate;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.Architectures.layeredArchitecture;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import org.junit.jupiter.api.Test;

/** Data walks one way through the rooms, and nobody looks back. */
class ArchitectureTest {
    private static final String ROOT = "org.laddergate.";
    private static final JavaClasses CLASSES = new ClassFileImporter()
            .withImportOption(new ImportOption.DoNotIncludeTests()).importPackages("org.laddergate");

    @Test
    void rooms_lookOneWayOnly() {
        layeredArchitecture().consideringOnlyDependenciesInAnyPackage("org.laddergate..")
                .withOptionalLayers(true)
                .layer("measurement").definedBy(ROOT + "measurement..")
                .layer("thermal").definedBy(ROOT + "thermal..")
                .layer("limits").definedBy(ROOT + "limits..")
                .layer("golden").definedBy(ROOT + "golden..")
                .layer("screening").definedBy(ROOT + "screening..")
                .layer("records").definedBy(ROOT + "records..")
                .layer("line").definedBy(ROOT + "line..")
                .layer("http").definedBy(ROOT + "http..")
                .layer("demo").definedBy(ROOT + "demo..")
                .layer("app").definedBy(ROOT + "app..")
                .whereLayer("measurement").mayNotAccessAnyLayer()
                .whereLayer("thermal").mayOnlyAccessLayers("measurement")
                .whereLayer("limits").mayOnlyAccessLayers("measurement", "thermal")
                .whereLayer("golden").mayOnlyAccessLayers("measurement", "thermal", "limits")
                .whereLayer("screening").mayOnlyAccessLayers("measurement", "thermal", "limits", "golden")
                .whereLayer("line").mayOnlyAccessLayers("measurement", "thermal", "limits", "golden", "screening")
                .whereLayer("records").mayOnlyAccessLayers("measurement", "thermal", "limits", "golden", "screening",
                        "line")
                .whereLayer("http").mayOnlyAccessLayers("measurement", "thermal", "limits", "golden", "screening",
                        "line")
                .whereLayer("demo").mayOnlyAccessLayers("measurement", "thermal", "limits", "golden")
                .whereLayer("app").mayNotBeAccessedByAnyLayer()
                .check(CLASSES);
    }

    @Test
    void domain_knowsNoTechnology() {
        noClasses().that().resideInAnyPackage(ROOT + "measurement..", ROOT + "thermal..", ROOT + "limits..",
                ROOT + "golden..", ROOT + "screening..", ROOT + "line..").should().dependOnClassesThat()
                .resideInAnyPackage("io.javalin..", "jakarta.servlet..", "org.eclipse.jetty..", "com.fasterxml..",
                        "java.sql..", "javax.sql..", "org.sqlite..", "io.micrometer..", "picocli..").check(CLASSES);
    }

    @Test
    void sqlAndHttp_stayInTheirRooms() {
        noClasses().that().resideOutsideOfPackages(ROOT + "records..", ROOT + "app..").should().dependOnClassesThat()
                .resideInAnyPackage("java.sql..", "org.sqlite..").check(CLASSES);
        noClasses().that().resideOutsideOfPackage(ROOT + "http..").should().dependOnClassesThat()
                .resideInAnyPackage("io.javalin..", "jakarta.servlet..", "org.eclipse.jetty..").check(CLASSES);
    }

    /** The rules above would hold for no classes at all. */
    @Test
    void classes_wereFound() {
        assertTrue(CLASSES.contain(ROOT + "http.HttpService") && CLASSES.contain(ROOT + "measurement.CurveRules"));
    }
}
