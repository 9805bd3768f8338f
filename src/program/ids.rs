//! Ids: indices into the Program's lists.

macro_rules! ids {
    ($($name:ident $what:literal;)*) => {$(
        #[doc = concat!("The index of a ", $what, " in the Program.")]
        #[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
        pub struct $name(pub usize);
    )*};
}

ids! {
    QuantityId "basis, assumption, derived value or result";
    SpeciesId "species";
    StateId "state";
    StepId "step";
    DutyId "duty";
}
