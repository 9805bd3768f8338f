//! The elements and their standard atomic weights.

use uom::si::f64::MolarMass;

use super::si::typed;

/// Where the atomic weights come from.
pub const ATOMIC_WEIGHTS_SOURCE: &str = "IUPAC standard atomic weights 2021, abridged to five significant figures, \
     conventional values (Prohaska et al., Pure Appl. Chem. 2022, 94, 573)";

/// Symbols by atomic number, with the abridged standard atomic weight where the element has one. The values
/// were taken from the open package `pyciaaw` 1.3.2, which carries the tables of the IUPAC commission; no
/// printed copy was at hand.
#[rustfmt::skip]
const ELEMENTS: [(&str, Option<f64>); 118] = [
    ("H", Some(1.008)), ("He", Some(4.0026)), ("Li", Some(6.94)), ("Be", Some(9.0122)), ("B", Some(10.81)),
    ("C", Some(12.011)), ("N", Some(14.007)), ("O", Some(15.999)), ("F", Some(18.998)), ("Ne", Some(20.18)),
    ("Na", Some(22.99)), ("Mg", Some(24.305)), ("Al", Some(26.982)), ("Si", Some(28.085)),
    ("P", Some(30.974)), ("S", Some(32.06)), ("Cl", Some(35.45)), ("Ar", Some(39.95)), ("K", Some(39.098)),
    ("Ca", Some(40.078)), ("Sc", Some(44.956)), ("Ti", Some(47.867)), ("V", Some(50.942)),
    ("Cr", Some(51.996)), ("Mn", Some(54.938)), ("Fe", Some(55.845)), ("Co", Some(58.933)),
    ("Ni", Some(58.693)), ("Cu", Some(63.546)), ("Zn", Some(65.38)), ("Ga", Some(69.723)),
    ("Ge", Some(72.63)), ("As", Some(74.922)), ("Se", Some(78.971)), ("Br", Some(79.904)),
    ("Kr", Some(83.798)), ("Rb", Some(85.468)), ("Sr", Some(87.62)), ("Y", Some(88.906)),
    ("Zr", Some(91.224)), ("Nb", Some(92.906)), ("Mo", Some(95.95)), ("Tc", None), ("Ru", Some(101.07)),
    ("Rh", Some(102.91)), ("Pd", Some(106.42)), ("Ag", Some(107.87)), ("Cd", Some(112.41)),
    ("In", Some(114.82)), ("Sn", Some(118.71)), ("Sb", Some(121.76)), ("Te", Some(127.6)),
    ("I", Some(126.9)), ("Xe", Some(131.29)), ("Cs", Some(132.91)), ("Ba", Some(137.33)),
    ("La", Some(138.91)), ("Ce", Some(140.12)), ("Pr", Some(140.91)), ("Nd", Some(144.24)), ("Pm", None),
    ("Sm", Some(150.36)), ("Eu", Some(151.96)), ("Gd", Some(157.25)), ("Tb", Some(158.93)),
    ("Dy", Some(162.5)), ("Ho", Some(164.93)), ("Er", Some(167.26)), ("Tm", Some(168.93)),
    ("Yb", Some(173.05)), ("Lu", Some(174.97)), ("Hf", Some(178.49)), ("Ta", Some(180.95)),
    ("W", Some(183.84)), ("Re", Some(186.21)), ("Os", Some(190.23)), ("Ir", Some(192.22)),
    ("Pt", Some(195.08)), ("Au", Some(196.97)), ("Hg", Some(200.59)), ("Tl", Some(204.38)),
    ("Pb", Some(207.2)), ("Bi", Some(208.98)), ("Po", None), ("At", None), ("Rn", None), ("Fr", None),
    ("Ra", None), ("Ac", None), ("Th", Some(232.04)), ("Pa", Some(231.04)), ("U", Some(238.03)),
    ("Np", None), ("Pu", None), ("Am", None), ("Cm", None), ("Bk", None), ("Cf", None), ("Es", None),
    ("Fm", None), ("Md", None), ("No", None), ("Lr", None), ("Rf", None), ("Db", None), ("Sg", None),
    ("Bh", None), ("Hs", None), ("Mt", None), ("Ds", None), ("Rg", None), ("Cn", None), ("Nh", None),
    ("Fl", None), ("Mc", None), ("Lv", None), ("Ts", None), ("Og", None),
];

/// A chemical element; the order is that of the atomic numbers.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Element(u8);

impl Element {
    /// The element with this symbol, in its exact spelling.
    pub fn from_symbol(symbol: &str) -> Option<Element> {
        let at = ELEMENTS.iter().position(|(known, _)| *known == symbol)?;
        u8::try_from(at).ok().map(Element)
    }

    /// Its symbol.
    pub fn symbol(self) -> &'static str {
        ELEMENTS.get(usize::from(self.0)).map_or("", |(symbol, _)| symbol)
    }

    /// Its atomic number.
    pub fn atomic_number(self) -> u8 {
        self.0 + 1
    }

    /// Its standard atomic weight as the mass of one mole; none for an element without a stable composition
    /// in nature, such as technetium.
    pub fn molar_mass(self) -> Option<MolarMass> {
        let (_, weight) = ELEMENTS.get(usize::from(self.0))?;
        weight.map(|weight| typed(weight / 1000.0))
    }
}

impl std::fmt::Display for Element {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(self.symbol())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn spot_values_of_the_2021_abridged_table() {
        // Pure Appl. Chem. 2022, 94, 573, table 2; values from memory, agreeing with the package named above.
        let expected = [
            ("H", 1.008),
            ("C", 12.011),
            ("O", 15.999),
            ("S", 32.06),
            ("Ar", 39.95),
            ("Fe", 55.845),
            ("Zn", 65.38),
            ("Pb", 207.2),
            ("U", 238.03),
        ];
        for (symbol, weight) in expected {
            let element = Element::from_symbol(symbol).unwrap();
            assert_eq!(element.molar_mass().unwrap().value, weight / 1000.0, "{symbol}");
        }
    }

    #[test]
    fn numbers_and_symbols_belong_together() {
        for (symbol, number) in [("H", 1), ("Ca", 20), ("Zn", 30), ("Au", 79), ("Og", 118)] {
            let element = Element::from_symbol(symbol).unwrap();
            assert_eq!((element.atomic_number(), element.symbol()), (number, symbol));
        }
        assert_eq!(Element::from_symbol("zn"), None);
    }

    #[test]
    fn thirty_four_elements_have_no_standard_weight() {
        // 118 elements, 84 with a standard atomic weight (counted in the table of 2021).
        let without = ELEMENTS.iter().filter(|(_, weight)| weight.is_none()).count();
        assert_eq!(without, 34);
        assert_eq!(Element::from_symbol("Tc").unwrap().molar_mass(), None);
    }
}
