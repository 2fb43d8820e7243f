package iridepth.simulation;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import org.junit.jupiter.api.Test;

/** The simulation judges the product, so it must share none of its code. */
class IndependenceTest {
    @Test
    void theSimulationUsesNoClassOfTheProduct() {
        noClasses().should().dependOnClassesThat(JavaClass.Predicates.resideInAPackage("iridepth..")
                        .and(JavaClass.Predicates.resideOutsideOfPackage("iridepth.simulation..")))
                .check(new ClassFileImporter().importPackages("iridepth.simulation"));
    }
}
