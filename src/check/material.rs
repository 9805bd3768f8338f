//! Materials: what a name, a state symbol and a phase's word stand for, and whether a constituent has moles.

use super::checker::{Checker, Declared, Material};
use super::phase::class_of;
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::program::{Constituent, SpeciesId};
use crate::span::Span;
use crate::syntax::tree::SpeciesName;
use crate::thermo::{PhaseClass, Pin};

impl Checker<'_> {
    /// What a material's name stands for; `None` where that was reported, now or before.
    pub(super) fn material(&mut self, name: &SpeciesName) -> Option<Material> {
        match self.materials.get(&name.name) {
            Some(Declared { what: Material::Broken, .. }) => None,
            Some(declared) => Some(declared.what.clone()),
            None if self.broken.contains(&name.name) => None,
            None => {
                self.unknown_material(name);
                None
            }
        }
    }

    fn unknown_material(&mut self, name: &SpeciesName) {
        if let Some(place) = self.ahead.get(&name.name).copied().filter(|place| place.start > name.span.start)
        {
            self.report(
                Diagnostic::new(
                    Code::UsedBeforeDeclared,
                    format!("`{}` is used before it is declared", name.name),
                )
                .label(name.span, "used here")
                .label(place, "declared only here")
                .help("a sheet is read from the top: move the declaration above this line"),
            );
            return;
        }
        let found = Diagnostic::new(Code::UnknownSpecies, format!("unknown material `{}`", name.name))
            .label(name.span, "no species or mixture of this name");
        let help = match nearest(&name.name, self.materials.keys().map(String::as_str)) {
            Some(near) => format!("did you mean `{near}`?"),
            None => {
                format!("declare it with a block `species {} {{ ... }}`, or take it with `use`", name.name)
            }
        };
        self.report(found.help(help));
    }

    /// The phase that a state symbol says; a species with one phase is always in it.
    pub(super) fn pin(&mut self, species: SpeciesId, name: &SpeciesName) -> Option<Pin> {
        let phases = self.program.species.get(species.0)?.phases.clone();
        let Some(symbol) = &name.symbol else {
            return Some(if phases.len() == 1 { Pin::Phase(0) } else { Pin::Stable });
        };
        let of_class = |class: PhaseClass| -> Vec<usize> {
            (0..phases.len()).filter(|at| phases[*at].class == class).collect()
        };
        let class = match symbol.text.as_str() {
            "s" | "cr" => Some(PhaseClass::Solid),
            "l" => Some(PhaseClass::Liquid),
            "g" => Some(PhaseClass::Gas),
            _ => None,
        };
        if let Some(at) =
            phases.iter().position(|phase| phase.name == symbol.text || phase.symbol == symbol.text)
        {
            return Some(Pin::Phase(at));
        }
        match class.map(|class| (class, of_class(class))) {
            Some((_, which)) if which.len() == 1 => Some(Pin::Phase(which[0])),
            Some((class, which)) if which.len() > 1 => Some(Pin::Class(class)),
            _ => {
                let known: Vec<String> =
                    phases.iter().map(|phase| format!("`{}({})`", name.name, phase.symbol)).collect();
                self.report(
                    Diagnostic::new(
                        Code::UnknownPhase,
                        format!("`{}` has no phase `{}`", name.name, symbol.text),
                    )
                    .label(symbol.span, "not a phase of its block")
                    .help(format!("it has {}", known.join(", "))),
                );
                None
            }
        }
    }

    /// A word for a phase of a species, as in `40 % liquid`: a phase's name or a class.
    pub(super) fn phase_word(&mut self, species: SpeciesId, word: &str, span: Span) -> Option<usize> {
        let info = self.program.species.get(species.0)?;
        let class = match word {
            "vapour" | "vapor" | "g" => Some(PhaseClass::Gas),
            "l" => Some(PhaseClass::Liquid),
            "s" => Some(PhaseClass::Solid),
            _ => class_of(word),
        };
        let by_name = info.phases.iter().position(|phase| phase.name == word);
        let by_class = || info.phases.iter().position(|phase| Some(phase.class) == class);
        if let Some(at) = by_name.or_else(by_class) {
            return Some(at);
        }
        let (name, known) = (
            info.name.clone(),
            info.phases.iter().map(|phase| phase.name.clone()).collect::<Vec<_>>().join(", "),
        );
        self.report(
            Diagnostic::new(Code::UnknownPhase, format!("`{name}` has no phase `{word}`"))
                .label(span, "not a phase of its block")
                .help(format!("its phases: {known}")),
        );
        None
    }

    pub(super) fn constituent_name(&self, part: &Constituent) -> String {
        let Some(species) = self.program.species.get(part.species.0) else { return String::new() };
        match part.pin {
            Pin::Phase(at) if species.phases.len() > 1 => species.in_phase(at),
            Pin::Class(PhaseClass::Solid) => format!("{}(s)", species.name),
            Pin::Class(PhaseClass::Liquid) => format!("{}(l)", species.name),
            Pin::Class(PhaseClass::Gas) => format!("{}(g)", species.name),
            Pin::Phase(_) | Pin::Stable => species.name.clone(),
        }
    }

    pub(super) fn molar_mass_of(&self, species: SpeciesId) -> Option<f64> {
        self.program.species.get(species.0)?.molar_mass
    }

    /// The class of a constituent where its phase is said, or where all its phases are of one class.
    pub(super) fn class_of_constituent(&self, part: &Constituent) -> Option<PhaseClass> {
        let species = self.program.species.get(part.species.0)?;
        match part.pin {
            Pin::Phase(at) => species.phases.get(at).map(|phase| phase.class),
            Pin::Class(class) => Some(class),
            Pin::Stable => {
                let first = species.phases.first()?.class;
                species.phases.iter().all(|phase| phase.class == first).then_some(first)
            }
        }
    }

    pub(super) fn report_no_moles(&mut self, name: &str, span: Span, what: &str) {
        self.report(
            Diagnostic::new(
                Code::MolesWithoutFormula,
                format!("{what} is asked, but `{name}` has no formula"),
            )
            .label(span, "moles of a material without a formula")
            .help("count it by mass, or give the species its `formula` or `molar_mass`"),
        );
    }

    pub(super) fn all_have_moles(&mut self, parts: &[Constituent], span: Span, what: &str) -> Option<()> {
        for part in parts {
            if self.molar_mass_of(part.species).is_none() {
                let name = self.constituent_name(part);
                self.report_no_moles(&name, span, what);
                return None;
            }
        }
        Some(())
    }
}
