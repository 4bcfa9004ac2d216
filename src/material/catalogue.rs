//! The records built into the program: identifier, designations, and the text of the file.
//!
//! Names stand here a second time so that a material is found without reading every record; a test keeps the
//! list equal to the files.

/// One built-in record.
pub(super) struct Entry {
    /// Identifier.
    pub id: &'static str,
    /// Other designations it is found by.
    pub designations: &'static [&'static str],
    /// File name in `materials`.
    pub file: &'static str,
    /// The record.
    pub text: &'static str,
}

macro_rules! entries {
    ($($file:literal: $id:literal, $designations:expr;)*) => {
        &[$(Entry {
            id: $id,
            designations: &$designations,
            file: $file,
            text: include_str!(concat!("../../materials/", $file)),
        }),*]
    };
}

/// Every built-in record, by file name.
pub(super) const ENTRIES: &[Entry] = entries! {
    "100cr6.yaml": "100Cr6", ["1.3505", "AISI 52100", "SAE 52100", "52100", "SUJ2"];
    "16mncr5-case-hardened.yaml": "16MnCr5-case-hardened", ["16MnCr5", "1.7131", "SAE 5115"];
    "18crnimo7-6-case-hardened.yaml": "18CrNiMo7-6-case-hardened", ["18CrNiMo7-6", "1.6587"];
    "33crmov12-9-qt.yaml": "33CrMoV12-9+QT", ["33CrMoV12-9", "1.8522"];
    "34crnimo6-qt.yaml": "34CrNiMo6+QT", ["34CrNiMo6", "1.6582"];
    "42crmo4-qt.yaml": "42CrMo4+QT", ["42CrMo4", "1.7225", "AISI 4140", "SAE 4140", "AISI 4142", "SCM440"];
    "alloy-400.yaml": "Alloy-400", ["400", "N04400", "UNS N04400", "2.4360", "NiCu30Fe"];
    "alloy-718.yaml": "Alloy-718",
        ["718", "N07718", "UNS N07718", "2.4668", "NiCr19Fe19Nb5Mo3", "AMS 5662", "AMS 5663"];
    "az91d.yaml": "AZ91D", ["MgAl9Zn1", "EN MCMgAl9Zn1", "EN-MC21120"];
    "c17200-tf00.yaml": "C17200-TF00", ["CuBe2", "C17200", "UNS C17200", "CW101C"];
    "c35e-n.yaml": "C35E+N", ["C35+N", "C35", "C35E", "1.1181", "1.0501", "AISI 1035", "SAE 1035", "Ck35"];
    "c35e-qt.yaml": "C35E+QT",
        ["C35+QT", "C35", "C35E", "1.1181", "1.0501", "AISI 1035", "SAE 1035", "Ck35"];
    "c36000-h02.yaml": "C36000-H02", ["C36000", "UNS C36000", "CuZn36Pb3", "CW603N"];
    "c45-n.yaml": "C45+N", ["C45", "C45E", "1.0503", "1.1191", "AISI 1045", "SAE 1045", "Ck45", "C45E+N"];
    "c45-qt.yaml": "C45+QT",
        ["C45", "C45E", "1.0503", "1.1191", "AISI 1045", "SAE 1045", "Ck45", "C45E+QT"];
    "c95400.yaml": "C95400", ["CuAl11Fe3", "UNS C95400", "CuAl10Fe3"];
    "cu-etp-r290.yaml": "Cu-ETP-R290", ["Cu-ETP", "CW004A", "C11000", "UNS C11000", "E-Cu"];
    "cusn12-c-gc.yaml": "CuSn12-C-GC", ["CuSn12-C", "CuSn12", "CC483K", "2.1052"];
    "cusn7zn4pb7-c-gc.yaml": "CuSn7Zn4Pb7-C-GC",
        ["CuSn7Zn4Pb7-C", "CC493K", "Rg 7", "C93200", "UNS C93200"];
    "cusn8-r450.yaml": "CuSn8-R450", ["CuSn8", "CW453K", "C52100", "UNS C52100", "2.1030"];
    "cuzn39pb3.yaml": "CuZn39Pb3", ["CW614N", "C38500", "UNS C38500", "2.0401", "Ms58"];
    "e335.yaml": "E335", ["1.0060", "St 60-2"];
    "ea1n.yaml": "EA1N", ["EN 13261 EA1N"];
    "en-ac-42100-t6.yaml": "EN-AC-42100-T6",
        ["AlSi7Mg", "AlSi7Mg0.3", "EN AC-42100", "A356", "A356-T6", "42100-T6"];
    "en-ac-46000-f.yaml": "EN-AC-46000-F", ["AlSi9Cu3", "AlSi9Cu3(Fe)", "EN AC-46000", "46000"];
    "en-aw-2024-t351.yaml": "EN-AW-2024-T351",
        ["2024", "2024-T3", "2024-T4", "2024-T351", "EN AW-2024", "AlCu4Mg1", "A92024", "UNS A92024"];
    "en-aw-5083-o.yaml": "EN-AW-5083-O", ["5083", "5083-O", "5083-H111", "EN AW-5083", "AlMg4.5Mn0.7"];
    "en-aw-6061-t6.yaml": "EN-AW-6061-T6",
        ["6061", "6061-T6", "6061-T651", "EN AW-6061", "AlMg1SiCu", "A96061", "UNS A96061"];
    "en-aw-6082-t6.yaml": "EN-AW-6082-T6", ["6082", "6082-T6", "EN AW-6082", "AlSi1MgMn", "AlMgSi1"];
    "en-aw-7075-t651.yaml": "EN-AW-7075-T651",
        ["7075", "7075-T6", "7075-T651", "EN AW-7075", "AlZn5.5MgCu", "A97075", "UNS A97075"];
    "en-gjl-200.yaml": "EN-GJL-200", ["GJL-200", "GG-20", "EN-JL1030", "5.1300"];
    "en-gjl-250.yaml": "EN-GJL-250", ["GJL-250", "GG-25", "EN-JL1040", "5.1301"];
    "en-gjl-300.yaml": "EN-GJL-300", ["GJL-300", "GG-30", "EN-JL1050", "5.1302"];
    "en-gjmw-450-7.yaml": "EN-GJMW-450-7", ["GJMW-450-7", "GTW-45", "GTW-45-07"];
    "en-gjs-400-15.yaml": "EN-GJS-400-15", ["GJS-400-15", "GGG-40", "EN-JS1030", "5.3106"];
    "en-gjs-500-7.yaml": "EN-GJS-500-7", ["GJS-500-7", "GGG-50", "EN-JS1050", "5.3200"];
    "en-gjs-600-3.yaml": "EN-GJS-600-3", ["GJS-600-3", "GGG-60", "EN-JS1060", "5.3201"];
    "en-gjs-700-2.yaml": "EN-GJS-700-2", ["GJS-700-2", "GGG-70", "EN-JS1070", "5.3300"];
    "er7.yaml": "ER7", ["EN 13262 ER7"];
    "fe-36ni.yaml": "Fe-36Ni", ["K93600", "UNS K93600", "1.3912", "FeNi36", "Ni36"];
    "ge300-n.yaml": "GE300+N", ["GE300", "1.0558", "GS-60"];
    "pa66.yaml": "PA66", ["PA 6.6", "Polyamide 66", "Nylon 66"];
    "peek.yaml": "PEEK", ["Polyether ether ketone"];
    "pom-c.yaml": "POM-C", ["POM", "Acetal copolymer"];
    "s235jr.yaml": "S235JR", ["1.0038", "St 37-2", "RSt 37-2"];
    "s355j2.yaml": "S355J2", ["1.0577", "S355J2+N", "St 52-3"];
    "ti-6al-4v.yaml": "Ti-6Al-4V",
        ["TiAl6V4", "R56400", "UNS R56400", "3.7165", "3.7164", "Titanium grade 5", "Ti Grade 5"];
    "titanium-grade-2.yaml": "Titanium-Grade-2", ["Ti Grade 2", "R50400", "UNS R50400", "3.7035"];
    "wc-10co.yaml": "WC-10Co", ["WC-Co 10", "Cemented carbide"];
    "x105crmo17.yaml": "X105CrMo17", ["1.4125", "AISI 440C", "440C", "S44004", "UNS S44004"];
    "x17crni16-2-qt800.yaml": "X17CrNi16-2+QT800",
        ["X17CrNi16-2", "1.4057", "AISI 431", "431", "S43100", "UNS S43100"];
    "x17crni16-2-qt900.yaml": "X17CrNi16-2+QT900",
        ["X17CrNi16-2", "1.4057", "AISI 431", "431", "S43100", "UNS S43100"];
    "x20cr13-qt700.yaml": "X20Cr13+QT700", ["X20Cr13", "1.4021", "AISI 420", "420", "S42000", "UNS S42000"];
    "x20cr13-qt800.yaml": "X20Cr13+QT800", ["X20Cr13", "1.4021", "AISI 420", "420", "S42000", "UNS S42000"];
    "x2crnimo17-12-2.yaml": "X2CrNiMo17-12-2",
        ["1.4404", "AISI 316L", "316L", "S31603", "UNS S31603", "AISI 316", "316"];
    "x2crnimon22-5-3.yaml": "X2CrNiMoN22-5-3",
        ["1.4462", "S31803", "S32205", "UNS S31803", "UNS S32205", "2205"];
    "x40crmov5-1-qt.yaml": "X40CrMoV5-1+QT", ["X40CrMoV5-1", "1.2344", "AISI H13"];
    "x5crni18-10.yaml": "X5CrNi18-10", ["1.4301", "AISI 304", "304", "S30400", "UNS S30400", "SUS304"];
    "x5crnicunb16-4-p930.yaml": "X5CrNiCuNb16-4+P930",
        ["X5CrNiCuNb16-4", "1.4542", "17-4PH", "S17400", "UNS S17400", "AISI 630"];
    "x6cr17.yaml": "X6Cr17", ["1.4016", "AISI 430", "430", "S43000", "UNS S43000"];
    "znal4cu1.yaml": "ZnAl4Cu1", ["ZP0410", "ZP5", "EN 12844 ZP0410", "AC41A", "Alloy 5"];
};

#[cfg(test)]
mod tests {
    use super::*;
    use crate::material::{Origin, yaml};

    #[test]
    fn the_list_equals_the_files() {
        for entry in ENTRIES {
            let material = yaml::read(entry.text, "no id", Origin::BuiltIn)
                .unwrap_or_else(|fault| panic!("{}: {fault:?}", entry.file));
            assert_eq!(material.id, entry.id, "{}", entry.file);
            assert_eq!(material.designations, entry.designations, "{}", entry.file);
        }
    }

    #[test]
    fn the_list_is_in_alphabetical_order() {
        assert!(ENTRIES.is_sorted_by_key(|entry| entry.file));
    }
}
