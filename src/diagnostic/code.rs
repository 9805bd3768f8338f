//! The table of codes: each names one kind of finding, for good. A code is never given another meaning.

use super::Severity::{self, Caution, Error, Warning};

macro_rules! codes {
    ($($name:ident $text:literal $severity:ident $title:literal;)*) => {
        /// The stable code of a diagnostic. The letter tells the area: `S` syntax, `U` units, `K` kinds and
        /// dimensions, `N` names, `M` materials, `T` states and steps, `R` found while working the sheet,
        /// `L` not worked by this version, `W` warnings, `C` cautions.
        #[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
        #[allow(missing_docs)]
        pub enum Code { $($name),* }

        impl Code {
            /// Every code, in the order of the table.
            pub const ALL: &'static [Code] = &[$(Code::$name),*];

            /// The code as printed, such as `K301`.
            pub fn as_str(self) -> &'static str {
                match self { $(Code::$name => $text),* }
            }

            /// How grave a finding of this code is.
            pub fn severity(self) -> Severity {
                match self { $(Code::$name => $severity),* }
            }

            /// What the code stands for, in a few words.
            pub fn title(self) -> &'static str {
                match self { $(Code::$name => $title),* }
            }

            /// The page that `heatpath explain` prints, in Markdown.
            pub fn explanation(self) -> &'static str {
                match self { $(Code::$name => include_str!(concat!("explain/", $text, ".md"))),* }
            }
        }
    };
}

codes! {
    Unreadable "S101" Error "a statement that cannot be read";
    Bracket "S102" Error "a bracket without its partner";
    DecimalComma "S103" Error "a comma inside a number";
    BareDecimalPoint "S104" Error "a decimal point without a digit on both sides";
    NumberBeforeName "S105" Error "a number straight before a name";
    BlankInUnit "S106" Error "a blank inside a unit";
    UnknownStatement "S107" Error "a line that begins with no statement word";
    TooDeep "S108" Error "brackets nested too deep";
    TooLong "S109" Error "a statement that is too long";
    FileTooLarge "S110" Error "a file that is too large";
    NotUtf8 "S111" Error "a file that is not UTF-8 text";
    ControlCharacter "S112" Error "a control character in a sheet";
    ChainedPower "S113" Error "a chained `^`";
    TwoSigns "S114" Error "two signs in a row";
    OpenText "S115" Error "a text without its closing quote";
    NumberTooLarge "S116" Error "a number beyond the range of a double";
    HeadMisplaced "S117" Error "a sheet head that is not first, or not alone";
    UnknownEntry "S118" Error "an entry that its block does not know";
    FileUnreadable "S120" Error "a sheet that cannot be opened";
    ReservedName "S121" Error "a reserved word used as a name";

    UnknownUnit "U201" Error "an unknown unit";
    AmbiguousUnit "U202" Error "a unit name with more than one meaning";
    CubicNanometre "U203" Error "a cubic nanometre where a normal cubic metre was meant";
    UnitPower "U204" Error "a unit raised to a power out of range";
    WrongDisplayUnit "U205" Error "a result shown in a unit of another dimension";
    ReadingInCompound "U206" Error "a gauge unit inside a compound unit";

    UnlikeSum "K301" Error "unlike quantities added or subtracted";
    PointsAdded "K302" Error "two temperature readings added";
    PointForDifference "K303" Error "a temperature reading where a difference is wanted";
    DifferenceForPoint "K304" Error "a difference where a temperature or a pressure is wanted";
    PointInProduct "K305" Error "a temperature reading in a product";
    MassAgainstAmount "K306" Error "mass against amount of substance";
    PureNumberWanted "K308" Error "a quantity where a pure number is wanted";
    BadExponent "K309" Error "an exponent that cannot be";
    UnlikeComparison "K310" Error "unlike quantities compared";
    UnlikeArguments "K311" Error "unlike quantities in one function";
    GaugesAdded "K312" Error "two gauge readings added";
    GaugeForDifference "K313" Error "a gauge reading where a difference is wanted";
    GaugeInProduct "K315" Error "a gauge reading in a product";
    WrongDimension "K316" Error "a quantity of another dimension than its place wants";
    PercentOfReading "K317" Error "a percentage of a reading";
    UnlikeInterval "K318" Error "an interval of another dimension than its value";
    PercentOfPercent "K319" Error "a percentage of a percentage";
    OddRoot "K320" Error "a root that has no dimension";
    BadInterval "K321" Error "an interval that is not positive";
    DimensionOverflow "K322" Error "a dimension beyond all bounds";
    ArgumentCount "K323" Error "a function with too few or too many arguments";

    UnknownName "N401" Error "an unknown name";
    UsedBeforeDeclared "N402" Error "a name used before it is declared";
    DeclaredTwice "N403" Error "a name declared twice";
    UnknownMember "N404" Error "an unknown member";
    UnknownSpecies "N405" Error "an unknown species or mixture";
    EitherName "N406" Error "a name that could mean two things";
    UnknownFamily "N407" Error "an unknown family of the library";
    NotInFamily "N408" Error "a species that its family or file does not hold";
    ImportCycle "N409" Error "files that use each other in a circle";
    PathOutside "N410" Error "a file outside the sheet's folder";
    ImportUnreadable "N411" Error "a used file that cannot be opened";
    UnknownFunction "N412" Error "an unknown function";
    NotAQuantity "N413" Error "a name of another sort than its place wants";

    UnknownElement "M501" Error "an unknown element in a formula";
    BadFormula "M502" Error "a chemical formula that cannot be read";
    MolesWithoutFormula "M503" Error "amount of substance of a material without a formula";
    HeatCapacityDimension "M504" Error "a heat capacity of another dimension";
    PhasesUnconnected "M505" Error "phases without a transition between them";
    TransitionOrder "M506" Error "transitions out of order";
    RangeGap "M507" Error "a gap between two ranges";
    RangeOverlap "M508" Error "two ranges that overlap";
    RangeShort "M509" Error "a range that does not reach its transition";
    DatumMissing "M510" Error "a datum that is missing";
    DatumTwice "M511" Error "a datum given twice";
    MolarDatum "M512" Error "a molar datum of a material without molar mass";
    Coefficients "M513" Error "a coefficient that is missing, unknown or given twice";
    TableOrder "M514" Error "a table that does not rise";
    UnknownPhase "M515" Error "a phase that the species does not have";
    TransitionNames "M516" Error "a transition that does not fit the phases beside it";
    LatentMissing "M517" Error "a transition without its enthalpy";
    LatentSign "M518" Error "a latent heat that is not positive";
    SharesSum "M519" Error "shares that do not add up";
    ShareWrong "M521" Error "a share that cannot be";
    FormationWrong "M522" Error "a formation enthalpy that cannot be placed";
    FormationMissing "M523" Error "an absolute enthalpy without a formation enthalpy";
    MeltingRange "M525" Error "a transition range that cannot be";
    AllowWrong "M526" Error "an allowance that admits nothing";
    LatentContradiction "M527" Error "a latent heat that contradicts the formation enthalpies";
    DensityMissing "M528" Error "a volume of matter without density";
    VapourPressureMissing "M529" Error "a saturated state without a vapour pressure";
    VapourPressureWrong "M530" Error "a vapour pressure that cannot be";

    TemperatureMissing "T601" Error "a state without a temperature";
    PressureUnsaid "T602" Error "a pressure that does not follow";
    ConditionTwice "T603" Error "a condition said twice";
    HeatWithoutPath "T604" Error "heat asked of a step without a path";
    HeatStatedWithoutPath "T605" Error "heat stated of a step without a path";
    ClausesClash "T606" Error "clauses that exclude each other";
    TwoConstraints "T607" Error "two constraints on one unknown";
    NothingSettles "T608" Error "an unknown that nothing settles";
    FlowAtConstantVolume "T609" Error "constant volume for a flow";
    ClosedVolumeTakesIn "T610" Error "a closed volume that takes in matter";
    FlowAndBatch "T611" Error "a flow beside a batch";
    GasPathOnly "T614" Error "a path for gases only";
    FlowPathOnly "T615" Error "a path for flows only";
    ReversibleMixing "T616" Error "a reversible path that mixes or parts states";
    MaterialTurned "T617" Error "one material turned into another without formation enthalpies";
    ShareWithoutPlateau "T618" Error "a share of a phase that cannot be placed";
    SymbolWanted "T619" Error "a species whose phase is not said";
    UnknownLoop "T620" Error "unknowns that wait for each other";
    StateSymbolClash "T621" Error "a state symbol that contradicts another";
    TableVariable "T623" Error "a table over something that is no input";
    TableSteps "T624" Error "a table with impossible steps";

    DivisionByZero "R701" Error "a division by zero";
    OutsideRange "R702" Error "a temperature outside the data";
    OnTransition "R703" Error "a temperature on a transition with no side said";
    BelowAbsoluteZero "R704" Error "a temperature below absolute zero";
    NegativeAmount "R705" Error "an amount that is not positive";
    NotFinite "R706" Error "a value that is no finite number";
    BoilingPressure "R707" Error "boiling away from 101.325 kPa";
    Unreachable "R708" Error "a heat that no temperature answers";
    PressureNotPositive "R709" Error "a pressure that is not positive";
    PressuresDiffer "R710" Error "a step at constant pressure between two pressures";
    VolumeChanges "R711" Error "a step at constant volume that changes the volume";
    TemperaturesDiffer "R712" Error "an isothermal step between two temperatures";
    NotConserved "R713" Error "matter lost or gained in a step";
    BadEfficiency "R714" Error "an efficiency that cannot be";
    EfficiencyOnCooling "R715" Error "an efficiency on a cooling duty";
    ShareOutOfBounds "R716" Error "a share outside 0 % to 100 %";
    PressureRises "R717" Error "a pressure that rises without work";
    DatumNotPositive "R719" Error "a heat capacity or a density that is not positive";
    OutsideVapourPressure "R720" Error "a pressure outside the vapour-pressure law";

    LaterReaction "L901" Error "reactions are not worked yet";
    LaterEquilibrium "L902" Error "equilibria are not worked yet";
    LaterSteam "L904" Error "steam tables are not worked yet";
    LaterCarrier "L905" Error "carriers are not worked yet";
    LaterBalance "L906" Error "balances are not worked yet";
    LaterSettle "L907" Error "`settle` is not worked yet";
    LaterCorrelate "L908" Error "correlated inputs are not worked yet";
    LaterParted "L909" Error "parting a state by phase is not worked yet";

    UnitAndName "W101" Warning "a word that is both a unit and a name";
    FractionOfUnit "W102" Warning "a number over a quantity with its unit";
    CaloriesMixed "W103" Warning "thermochemical and International Table units in one sheet";
    TableRowRefused "W104" Warning "a table row that is refused";
    Extrapolated "W105" Warning "a datum used outside its range";
    VolumeNeglected "W106" Warning "a volume that is neglected";
    HeatCapacityJump "W107" Warning "a heat capacity that jumps between two ranges";
    EnthalpyConstant "W108" Warning "an enthalpy constant that contradicts the enthalpies";
    SourcesDiffer "W109" Warning "two sources that differ";
    SourceMissing "W110" Warning "a datum without a source";
    BoilingContradiction "W111" Warning "a boiling point that contradicts the vapour pressure";
    LatentSlope "W112" Warning "a latent heat that contradicts the vapour pressure";

    ClosedVolume "C801" Caution "a closed volume is heated";
    WaterBesideHot "C802" Caution "water beside something hotter than its boiling point";
    PressureEquipment "C803" Caution "a pressure above 0.5 bar gauge";
    FlammableVapour "C804" Caution "a flammable vapour is let off";
}

impl std::fmt::Display for Code {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(self.as_str())
    }
}

impl Code {
    /// The code printed as `text`, whatever its letter's case.
    pub fn parse(text: &str) -> Option<Code> {
        Code::ALL.iter().copied().find(|code| code.as_str().eq_ignore_ascii_case(text))
    }
}
