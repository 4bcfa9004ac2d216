//! The material library as shipped: every record and its sources, its figures against published ones, and
//! how materials are found, in the program and in a user's folder.

use std::collections::BTreeSet;
use std::fs;
use std::path::PathBuf;
use std::sync::LazyLock;

use hubgrip::material::friction::{FrictionMethod, Lubrication, friction};
use hubgrip::material::library::Library;
use hubgrip::material::{Family, Kind, Material, Origin, REFERENCE_TEMPERATURE, curves, media, yaml};
use proptest::prelude::*;

fn folder() -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR")).join("materials")
}

fn shipped() -> Vec<(&'static str, Material)> {
    Library::built_in_records()
        .map(|(file, text)| {
            let material = yaml::read(text, "no id", Origin::BuiltIn);
            (file, material.unwrap_or_else(|fault| panic!("{file}: {fault:?}")))
        })
        .collect()
}

fn find(name: &str) -> std::sync::Arc<Material> {
    Library::built_in().find(name).unwrap_or_else(|error| panic!("{error}"))
}

/// Yield and tensile strength, MPa, for a section in mm.
fn strength(name: &str, section_mm: f64) -> (Option<f64>, Option<f64>) {
    let material = find(name);
    let row = material.strength_for(section_mm * 1e-3).unwrap_or_else(|| panic!("{name} {section_mm} mm"));
    let mpa = |value: Option<f64>| value.map(|pascal| (pascal / 1e6).round());
    (mpa(row.yield_strength), mpa(row.tensile_strength))
}

// ---- the records themselves

#[test]
fn the_list_in_the_program_is_the_folder() {
    let listed: BTreeSet<String> = Library::built_in_records().map(|(file, _)| file.to_owned()).collect();
    let entries = fs::read_dir(folder()).unwrap().map(|entry| entry.unwrap().file_name());
    let names = entries.map(|name| name.into_string().unwrap());
    let files: BTreeSet<String> = names.filter(|name| name.ends_with(".yaml")).collect();
    assert_eq!(listed, files);
    assert!(listed.len() >= 34, "{} materials", listed.len());
}

#[test]
fn the_shared_curves_in_the_program_are_the_folder() {
    let entries = fs::read_dir(folder().join("expansion")).unwrap().map(|entry| entry.unwrap().path());
    let stems = entries.map(|path| path.file_stem().unwrap().to_str().unwrap().replace('-', " "));
    let files: BTreeSet<String> = stems.collect();
    assert_eq!(files, curves::names().map(str::to_owned).collect());
    for name in curves::names() {
        let text = fs::read_to_string(folder().join(format!("expansion/{}.yaml", name.replace(' ', "-"))));
        assert!(text.unwrap().contains(&format!("\nname: {name}\n")), "{name}");
        curves::named(name).unwrap();
    }
}

#[test]
fn a_file_is_named_after_its_material() {
    for (file, material) in shipped() {
        let safe = |c: char| if c.is_ascii_alphanumeric() || c == '.' { c.to_ascii_lowercase() } else { '-' };
        let name: String = material.id.chars().map(safe).collect();
        assert_eq!(file, format!("{name}.yaml"));
    }
}

#[test]
fn every_number_has_a_source() {
    let check = |file: &str, what: &str, source: &str| {
        assert!(source.len() >= 10 && source != "no source given", "{file}: {what}: `{source}`");
    };
    for (file, material) in shipped() {
        check(file, "youngs_modulus", &material.youngs_modulus.source);
        if let Some(curve) = &material.youngs_modulus_curve {
            check(file, "youngs_modulus_curve", &curve.source);
        }
        check(file, "poisson", &material.poisson.source);
        check(file, "density", &material.density.source);
        check(file, "expansion", &material.expansion.source);
        for row in &material.strength {
            check(file, "strength", &row.source);
        }
        for (what, value) in [
            ("conductivity", &material.conductivity),
            ("specific_heat", &material.specific_heat),
            ("max_temperature", &material.max_temperature),
        ] {
            check(file, what, &value.as_ref().unwrap_or_else(|| panic!("{file}: no {what}")).source);
        }
    }
}

#[test]
fn figures_are_those_of_their_kind_of_material() {
    // Textbook ranges; a slip of a power of ten or of a unit falls outside.
    for (file, material) in shipped() {
        let (modulus, density) = match material.family {
            Family::Steel | Family::CastSteel | Family::StainlessSteel => (190e9..=220e9, 7600.0..=8100.0),
            Family::GreyIron => (85e9..=140e9, 7000.0..=7400.0),
            Family::SpheroidalIron | Family::MalleableIron => (165e9..=180e9, 7000.0..=7500.0),
            Family::Aluminium => (68e9..=75e9, 2600.0..=2850.0),
            Family::Magnesium => (40e9..=46e9, 1700.0..=1900.0),
            Family::Bronze | Family::Brass | Family::Copper => (90e9..=135e9, 7400.0..=9000.0),
            Family::Titanium => (100e9..=120e9, 4400.0..=4600.0),
            Family::Nickel => (140e9..=215e9, 8000.0..=8900.0),
            Family::Zinc => (80e9..=100e9, 6600.0..=6800.0),
            Family::CementedCarbide => (550e9..=650e9, 14_000.0..=15_000.0),
            Family::Polymer => (1e9..=4e9, 1100.0..=1450.0),
            Family::Other => panic!("{file}: no family"),
        };
        assert!(modulus.contains(&material.youngs_modulus.value), "{file}");
        assert!(density.contains(&material.density.value), "{file}");
        assert!((0.2..0.4).contains(&material.poisson.value), "{file}");
        assert!(material.low_temperature_caution.is_some(), "{file}");
        assert_eq!(material.kind == Kind::Polymer, material.family == Family::Polymer, "{file}");
    }
}

#[test]
fn the_expansion_reaches_the_highest_temperature_of_assembly() {
    for (file, material) in shipped() {
        let (from, to) = material.expansion.range();
        assert!(to >= material.max_temperature.as_ref().unwrap().value - 1e-9, "{file}");
        assert!(from <= media::dry_ice::TEMPERATURE.value || material.family == Family::Zinc, "{file}");
        assert_eq!(material.expansion.strain(REFERENCE_TEMPERATURE), Ok(0.0), "{file}");
    }
}

#[test]
fn metals_that_are_chilled_in_nitrogen_have_a_curve_down_to_it() {
    for (file, material) in shipped() {
        let excused = matches!(material.family, Family::Zinc) || material.id == "POM-C";
        let (from, _) = material.expansion.range();
        assert!(excused || from <= media::liquid_nitrogen::TEMPERATURE.value, "{file}");
    }
}

#[test]
fn the_example_in_the_readme_is_a_material() {
    let readme = fs::read_to_string(folder().join("README.md")).unwrap();
    let example = readme.split("```yaml\n").nth(1).and_then(|rest| rest.split("```").next()).unwrap();
    let material = yaml::read(example, "demo", Origin::JointFile).unwrap_or_else(|fault| panic!("{fault:?}"));
    assert_eq!(material.id, "Demo-steel+QT");
    assert_eq!(material.strength.len(), 2);
    assert!(material.expansion.strain(77.36).is_ok());
}

#[test]
fn the_schema_for_editors_knows_every_key_and_no_other() {
    let schema = schemars::generate::SchemaSettings::draft07().into_generator();
    let schema = schema.into_root_schema_for::<hubgrip::material::record::MaterialRecord>().to_value();
    assert_eq!(schema["additionalProperties"], false);
    let known = schema["properties"].as_object().unwrap();
    for (file, text) in Library::built_in_records() {
        let record: serde_yaml::Mapping = serde_yaml::from_str(text).unwrap();
        for key in record.keys().filter_map(|key| key.as_str()) {
            assert!(known.contains_key(key), "{file}: {key}");
        }
    }
    let required = ["kind", "youngs_modulus", "poisson", "density", "expansion"];
    assert_eq!(schema["required"], serde_json::json!(required));
}

// ---- expansion

/// NIST fit 1e5 (L − L₂₉₃)/L₂₉₃ = a + bT + cT² + dT³ + eT⁴, as the strain from 20 °C.
fn nist(coefficients: [f64; 5], kelvin: f64) -> f64 {
    let fit = |t: f64| coefficients.iter().rev().fold(0.0, |sum, c| sum * t + c) * 1e-5;
    (1.0 + fit(kelvin)) / (1.0 + fit(REFERENCE_TEMPERATURE)) - 1.0
}

/// NIST Cryogenic Technologies Group, property pages (6061-T6, 304, Fe-36Ni), and Marquardt, Le, Radebaugh,
/// Cryogenic Material Properties Database, 2000 (Ti-6Al-4V, 718, polyamide); 4 to 300 K.
const NIST: [(&str, [f64; 5]); 6] = [
    ("6061-T6", [-412.77, -0.30389, 8.7696e-3, -9.9821e-6, 0.0]),
    ("304", [-295.54, -0.39811, 9.2683e-3, -2.0261e-5, 1.7127e-8]),
    ("Fe-36Ni", [-52.65, 0.1009, 8.395e-4, -1.973e-6, 8.794e-11]),
    ("Ti-6Al-4V", [-171.1, -0.2171, 4.841e-3, -7.202e-6, 0.0]),
    ("Alloy 718", [-236.6, -0.2218, 5.601e-3, -7.164e-6, 0.0]),
    ("PA66", [-1389.0, -0.1561, 2.988e-2, -7.948e-5, 1.181e-7]),
];

/// The curve has a point every 10 K with eight decimals; the monotone cubic leaves the fit by less.
const CURVE_TO_FIT: f64 = 1e-6;

#[test]
fn the_cold_curves_follow_the_nist_fits() {
    for (name, coefficients) in NIST {
        let material = find(name);
        for step in 0..=2200 {
            let kelvin = 73.15 + 0.1 * f64::from(step);
            let strain = material.expansion.strain(kelvin).unwrap();
            let error = strain - nist(coefficients, kelvin);
            assert!(error.abs() < CURVE_TO_FIT, "{name} at {kelvin} K: off by {error}");
        }
    }
}

#[test]
fn aluminium_and_304_shrink_in_dry_ice_and_nitrogen_as_the_fits_say() {
    // The two fits evaluated at −78.5 °C and 77.36 K, to nine digits.
    for (name, dry_ice, nitrogen) in
        [("6061-T6", -2.13575604e-3, -3.88720781e-3), ("304", -1.47012585e-3, -2.79942284e-3)]
    {
        let expansion = &find(name).expansion;
        let strain = |kelvin: f64| expansion.strain(kelvin).unwrap();
        assert!((strain(media::dry_ice::TEMPERATURE.value) - dry_ice).abs() < CURVE_TO_FIT, "{name}");
        assert!(
            (strain(media::liquid_nitrogen::TEMPERATURE.value) - nitrogen).abs() < CURVE_TO_FIT,
            "{name}"
        );
    }
}

#[test]
fn contraction_to_77_k_is_that_of_an_independent_table() {
    // J. W. Ekin, Experimental Techniques for Low-Temperature Measurements, 2006, A6.4 (from memory), 1e-5;
    // the two differ by up to 0.6 %.
    for (name, printed) in [
        ("304", -281.0),
        ("316", -279.0),
        ("6061-T6", -389.0),
        ("Cu-ETP", -302.0),
        ("Ti-6Al-4V", -163.0),
        ("Alloy 718", -224.0),
        ("PA66", -1256.0),
    ] {
        let strain = find(name).expansion.strain(77.0).unwrap() * 1e5;
        assert!((strain / printed - 1.0).abs() < 0.006, "{name}: {strain} against {printed}");
    }
}

#[test]
fn carbon_steel_at_77_k_lies_between_iron_and_the_piping_code() {
    // Iron −190e-5 (Ekin, from memory); ASME B31.3 Table C-1 −196.3e-5 at 74.8 K; composite −195e-5.
    let strain = find("C45+N").expansion.strain(77.0).unwrap();
    assert!((strain + 195e-5).abs() < 1e-9, "{strain}");
    let sew_310 = find("42CrMo4+QT").expansion.strain(173.15).unwrap();
    assert!((sew_310 / -129.6e-5 - 1.0).abs() < 0.005, "SEW 310, −100 °C: {sew_310}");
}

#[test]
fn steel_shrinks_a_third_less_in_nitrogen_than_a_room_temperature_coefficient_says() {
    let expansion = &find("C45+N").expansion;
    let room = expansion.mean_coefficient(373.15).unwrap();
    let cold = expansion.mean_coefficient(77.36).unwrap();
    assert!(room / cold > 1.3 && room / cold < 1.4, "{room} {cold}");
}

#[test]
fn hot_mean_coefficients_are_the_printed_ones() {
    // (°C, 1e-6 /K): EN 10088-1 for 304, 420 and 430; ASME II-D Table TE-1 Group 1 for carbon steel; ASME B31.9
    // for iron; data sheets for the rest.
    for (name, printed) in [
        ("304", &[(100.0, 16.0), (200.0, 16.5), (300.0, 17.0), (400.0, 17.5), (500.0, 18.0)][..]),
        ("X20Cr13+QT700", &[(100.0, 10.5), (200.0, 11.0), (300.0, 11.5), (400.0, 12.0)]),
        ("430", &[(100.0, 10.0), (300.0, 10.5), (500.0, 11.0)]),
        ("S235JR", &[(100.0, 12.1), (200.0, 12.8), (300.0, 13.3)]),
        ("EN-GJL-250", &[(100.0, 10.4)]),
        ("EN-GJS-600-3", &[(100.0, 10.7)]),
        ("6061", &[(100.0, 23.6), (300.0, 25.2)]),
        ("Ti-6Al-4V", &[(100.0, 8.6), (300.0, 9.2)]),
    ] {
        let expansion = &find(name).expansion;
        for &(celsius, coefficient) in printed {
            let found = expansion.mean_coefficient(celsius + 273.15).unwrap() * 1e6;
            assert!((found - coefficient).abs() < 0.05, "{name} at {celsius} °C: {found}");
        }
    }
}

#[test]
fn nothing_is_extrapolated() {
    for (file, material) in shipped() {
        let (from, to) = material.expansion.range();
        assert!(material.expansion.strain(from - 0.5).is_err(), "{file}");
        assert!(material.expansion.strain(to + 0.5).is_err(), "{file}");
    }
}

// ---- strength

#[test]
fn strengths_by_section_are_the_printed_ones() {
    let both = |a: f64, b: f64| (Some(a), Some(b));
    // EN 10083-2:2006, Tables 8 to 10.
    assert_eq!(strength("C45+N", 16.0), both(340.0, 620.0));
    assert_eq!(strength("C45+N", 60.0), both(305.0, 580.0));
    assert_eq!(strength("C45+N", 250.0), both(275.0, 560.0));
    assert_eq!(strength("C45+QT", 40.0), both(430.0, 650.0));
    assert_eq!(strength("C35E+QT", 100.0), both(320.0, 550.0));
    // EN 10083-3:2006, Table 8.
    assert_eq!(strength("42CrMo4+QT", 10.0), both(900.0, 1100.0));
    assert_eq!(strength("42CrMo4+QT", 100.0), both(650.0, 900.0));
    assert_eq!(strength("42CrMo4+QT", 200.0), both(500.0, 750.0));
    // EN 10025-2:2004, Table 7.
    assert_eq!(strength("S235JR", 30.0).0, Some(225.0));
    assert_eq!(strength("S355J2", 80.0), both(325.0, 470.0));
    // EN 1561:1997, Table 1, by wall thickness.
    assert_eq!(strength("EN-GJL-250", 25.0), (None, Some(195.0)));
    assert_eq!(strength("EN-GJL-200", 8.0), (None, Some(205.0)));
    assert_eq!(strength("EN-GJL-300", 150.0), (None, Some(195.0)));
    // EN 1563:1997, Table 1.
    assert_eq!(strength("EN-GJS-400-15", 25.0), both(250.0, 400.0));
    assert_eq!(strength("EN-GJS-700-2", 30.0), both(420.0, 700.0));
    // EN 10088-3:2005.
    assert_eq!(strength("1.4301", 100.0), both(190.0, 500.0));
    assert_eq!(strength("X17CrNi16-2+QT800", 60.0), both(600.0, 800.0));
    // EN 485-2, O/H111 plate.
    assert_eq!(strength("5083", 60.0), both(115.0, 270.0));
}

#[test]
fn a_section_beyond_the_table_has_no_strength() {
    assert!(find("C45+N").strength_for(0.2501).is_none());
    assert!(find("EN-GJL-250").strength_for(0.151).is_none());
}

// ---- finding

#[test]
fn common_designations_lead_to_the_material() {
    for (given, id) in [
        ("C45+N", "C45+N"),
        ("c45 + n", "C45+N"),
        ("42crmo4", "42CrMo4+QT"),
        ("AISI 4140", "42CrMo4+QT"),
        ("GG25", "EN-GJL-250"),
        ("GJL-250", "EN-GJL-250"),
        ("en-gjl 250", "EN-GJL-250"),
        ("GGG 40", "EN-GJS-400-15"),
        ("St 60-2", "E335"),
        ("St37-2", "S235JR"),
        ("1.4301", "X5CrNi18-10"),
        ("AISI 304", "X5CrNi18-10"),
        ("UNS S30400", "X5CrNi18-10"),
        ("316L", "X2CrNiMo17-12-2"),
        ("16MnCr5", "16MnCr5-case-hardened"),
        ("6082-T6", "EN-AW-6082-T6"),
        ("Ti6Al4V", "Ti-6Al-4V"),
        ("AlSi7Mg", "EN-AC-42100-T6"),
        ("52100", "100Cr6"),
    ] {
        assert_eq!(find(given).id, id, "{given}");
    }
}

#[test]
fn a_designation_of_several_conditions_asks_which() {
    let error = Library::built_in().find("AISI 1045").unwrap_err();
    assert_eq!(error.candidates, ["C45+N", "C45+QT"]);
    assert_eq!(error.to_string(), "`AISI 1045` may be C45+N or C45+QT");
    assert_eq!(error.help(), "write `C45+N` or `C45+QT`");
}

#[test]
fn a_slip_of_the_pen_is_mended() {
    for (given, id) in [
        ("42CrMo5", "42CrMo4+QT"),
        ("EN-GJL-255", "EN-GJL-250"),
        ("C45N+", "C45+N"),
        ("6061-T5", "EN-AW-6061-T6"),
    ] {
        let library = Library::built_in();
        match library.find(given) {
            Ok(found) => assert_eq!(found.id, id, "{given}"),
            Err(error) => assert!(error.suggestions.contains(&id.to_owned()), "{given}: {error:?}"),
        }
    }
    let error = Library::built_in().find("unobtainium").unwrap_err();
    assert_eq!(error.to_string(), "no material is called `unobtainium`");
    assert!(error.suggestions.is_empty(), "{error:?}");
    assert!(error.help().contains("hubgrip materials"));
}

#[test]
fn no_two_records_have_one_identifier_and_no_name_is_lost() {
    let library = Library::built_in();
    for (file, material) in shipped() {
        assert_eq!(library.find(&material.id).unwrap().id, material.id, "{file}");
        for name in &material.designations {
            match library.find(name) {
                Ok(found) => assert_eq!(found.id, material.id, "{file}: {name}"),
                Err(error) => assert!(error.candidates.contains(&material.id), "{file}: {name}: {error:?}"),
            }
        }
    }
}

#[test]
fn search_wants_every_word() {
    let library = Library::built_in();
    let ids = |words: &str| -> Vec<String> {
        library.search(words).iter().map(|material| material.id.clone()).collect()
    };
    assert_eq!(ids("grey iron"), ["EN-GJL-200", "EN-GJL-250", "EN-GJL-300"]);
    assert_eq!(ids("quenched 4140"), ["42CrMo4+QT"]);
    assert_eq!(ids("").len(), Library::built_in_records().count());
    assert!(ids("grey zinc").is_empty());
}

// ---- the user's folder

const DEMO: &str = "name: Demo steel (invented figures)
kind: ductile
youngs_modulus: 200 GPa
poisson: 0.3
density: 7800 kg/m3
expansion: 12e-6 /K
yield_strength: 400 MPa
tensile_strength: 600 MPa
source: invented for a test
";

#[test]
fn a_users_file_is_found_before_the_library_and_said_so() {
    let (first, second) = (tempfile::tempdir().unwrap(), tempfile::tempdir().unwrap());
    let own = first.path().join("own.yaml");
    fs::write(&own, format!("id: c45+n\ndesignations: [GG-25]\n{DEMO}")).unwrap();
    fs::write(second.path().join("c45+n.yaml"), DEMO).unwrap();
    fs::write(second.path().join("demo.yml"), DEMO).unwrap();
    fs::write(second.path().join("README.md"), "not a material").unwrap();
    let library = Library::open(&[first.path().to_path_buf(), second.path().to_path_buf()]).unwrap();
    let found = library.find("C45+N").unwrap();
    assert_eq!(found.origin, Origin::File(own.clone()));
    assert_eq!(found.youngs_modulus.value, 200e9);
    assert_eq!(&*found.youngs_modulus.source, "invented for a test");
    assert_eq!(library.find("GG25").unwrap().id, "c45+n");
    assert_eq!(library.find("Demo").unwrap().id, "demo");
    let error = library.find("1.0503").unwrap_err();
    assert_eq!(error.candidates, ["c45+n", "C45+QT"], "a designation still asks which condition");
    let hidden: Vec<(&str, Vec<String>)> =
        library.hidden().iter().map(|hidden| (hidden.name.as_str(), hidden.instead_of.clone())).collect();
    assert_eq!(hidden[0], ("c45+n", vec!["C45+N".to_owned()]));
    assert_eq!(hidden[1], ("GG-25", vec!["EN-GJL-250".to_owned()]));
    assert_eq!(hidden[2].0, "c45+n");
    assert!(library.hidden()[0].to_string().contains("own.yaml"));
}

#[test]
fn a_broken_file_is_named_with_line_and_column() {
    let folder = tempfile::tempdir().unwrap();
    let broken = folder.path().join("broken.yaml");
    fs::write(&broken, DEMO.replace("poisson: 0.3", "poisson: 3")).unwrap();
    fs::write(folder.path().join("worse.yaml"), DEMO.replace("density", "densty")).unwrap();
    fs::write(folder.path().join("good.yaml"), DEMO).unwrap();
    let faults = Library::open(&[folder.path().to_path_buf()]).unwrap_err();
    assert_eq!(faults.len(), 2, "{faults:?}");
    assert_eq!(
        faults[0].to_string(),
        format!("{}:4:10: Poisson's ratio must lie between -1 and 0.5, not 3", broken.display())
    );
    assert_eq!(faults[1].help.as_deref(), Some("did you mean `density`?"));
    assert_eq!(faults[1].place.map(|place| (place.line, place.column)), Some((5, 1)));
}

#[test]
fn one_identifier_in_two_files_of_a_folder_is_a_fault() {
    let folder = tempfile::tempdir().unwrap();
    for name in ["a.yaml", "b.yaml"] {
        fs::write(folder.path().join(name), format!("id: twin\n{DEMO}")).unwrap();
    }
    let faults = Library::open(&[folder.path().to_path_buf()]).unwrap_err();
    assert_eq!(faults.len(), 1);
    assert_eq!(faults[0].file.as_deref(), Some(folder.path().join("b.yaml").as_path()));
}

#[test]
fn a_folder_that_is_not_there_is_a_fault() {
    let faults = Library::open(&[PathBuf::from("/no/such/folder")]).unwrap_err();
    assert_eq!(faults[0].file.as_deref(), Some(std::path::Path::new("/no/such/folder")));
}

// ---- friction

#[test]
fn default_friction_is_on_the_safe_side() {
    let (steel, iron) = (find("C45+N"), find("EN-GJL-250"));
    let pressed = friction(&steel, &steel, FrictionMethod::Pressed, None);
    assert_eq!(pressed.lubrication, Lubrication::Oiled);
    // DIN 7190 (from memory): 0.06 to 0.07 oiled, by hub steel.
    assert_eq!(pressed.holding.value.low, 0.06);
    // Press-in tests with machine oil, 0.054 to 0.22: the press must be able to do the high end.
    assert_eq!(pressed.pressing.value.high, 0.22);
    let shrunk = friction(&steel, &steel, FrictionMethod::Shrunk, None);
    assert_eq!(shrunk.lubrication, Lubrication::Dry);
    // DIN 7190 and GB/T 5371 (from memory): 0.14 not degreased, 0.20 degreased.
    assert_eq!(shrunk.holding.value.low, 0.14);
    let degreased = friction(&steel, &steel, FrictionMethod::Shrunk, Some(Lubrication::Degreased));
    assert_eq!(degreased.holding.value.low, 0.2);
    assert_eq!(friction(&iron, &steel, FrictionMethod::Pressed, None).pair, "steel/grey iron");
}

#[test]
fn every_pair_of_materials_has_ordered_ranges_with_sources() {
    let all = Library::built_in().search("");
    for outer in &all {
        for inner in &all {
            for method in [FrictionMethod::Pressed, FrictionMethod::Shrunk] {
                let states = [Lubrication::Oiled, Lubrication::Dry, Lubrication::Degreased].map(Some);
                for lubrication in states.into_iter().chain([None]) {
                    let set = friction(outer, inner, method, lubrication);
                    for range in [&set.holding, &set.pressing, &set.release] {
                        let pair = (&outer.id, &inner.id);
                        assert!(range.value.low > 0.0 && range.value.low <= range.value.high, "{pair:?}");
                        assert!(!range.source.is_empty(), "{pair:?}");
                    }
                    assert!(set.holding.value.low <= set.release.value.high);
                }
            }
        }
    }
}

#[test]
fn a_pair_without_data_says_so() {
    let (nickel, copper) = (find("Alloy 718"), find("Cu-ETP"));
    let set = friction(&nickel, &copper, FrictionMethod::Shrunk, None);
    assert!(set.is_fallback && set.holding.source.contains("no value for this pair"));
    assert!(!friction(&find("C45+N"), &find("E335"), FrictionMethod::Shrunk, None).is_fallback);
}

// ---- whatever is asked

static LIBRARY: LazyLock<Library> = LazyLock::new(Library::built_in);

proptest! {
    #[test]
    fn looking_up_any_name_never_panics(name in "\\PC{0,24}") {
        if let Err(error) = LIBRARY.find(&name) {
            prop_assert!(!error.help().is_empty() && !error.to_string().is_empty());
        }
        LIBRARY.search(&name);
    }

    #[test]
    fn reading_any_text_never_panics(text in "\\PC{0,80}") {
        let _ = yaml::read(&text, "demo", Origin::JointFile);
    }

    #[test]
    fn a_damaged_record_never_panics(cut in 0_usize..300, junk in "[-:{}\\[\\],#&*!|>'\"%@ \\na-z0-9]{0,12}") {
        let mut text: String = DEMO.chars().take(cut).collect();
        text.push_str(&junk);
        text.extend(DEMO.chars().skip(cut));
        if let Err(fault) = yaml::read(&text, "demo", Origin::JointFile) {
            prop_assert!(!fault.message.is_empty());
        }
    }

    #[test]
    fn strain_rises_with_temperature(first in 80.0_f64..420.0, second in 80.0_f64..420.0) {
        let expansion = find("EN-AW-6061-T6").expansion.clone();
        let (low, high) = (first.min(second), first.max(second));
        prop_assert!(expansion.strain(low).unwrap() <= expansion.strain(high).unwrap());
    }
}
