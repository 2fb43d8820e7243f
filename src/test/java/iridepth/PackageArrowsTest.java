package iridepth;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.List;
import org.junit.jupiter.api.Test;

class PackageArrowsTest {
    /** Each may use only those before it. */
    private static final List<String> ORDER = List.of("spectrum", "optics", "colour", "curve", "photo", "calibration", "reading",
            "planning", "quality", "report", "recipe", "app");

    private static final JavaClasses CLASSES = new ClassFileImporter().withImportOption(new ImportOption.DoNotIncludeTests())
            .importPackages("iridepth");

    @Test
    void eachPackageUsesOnlyThoseAboveItInTheTable() {
        for (int i = 0; i < ORDER.size(); i++) {
            String[] later = ORDER.subList(i + 1, ORDER.size()).stream().map(p -> "iridepth." + p + "..").toArray(String[]::new);
            if (later.length > 0) {
                noClasses().that().resideInAPackage("iridepth." + ORDER.get(i) + "..").should().dependOnClassesThat()
                        .resideInAnyPackage(later).allowEmptyShould(true).check(CLASSES);
            }
        }
    }

    @Test
    void everyClassHasARoom() {
        String[] rooms = ORDER.stream().map(p -> "iridepth." + p + "..").toArray(String[]::new);
        noClasses().should().resideOutsideOfPackages(rooms).check(CLASSES);
    }
}
