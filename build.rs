//! Rebuilds when a migration, a template or a static file changes: they are embedded in the binary.

fn main() {
    for folder in ["migrations", "templates", "static"] {
        println!("cargo:rerun-if-changed={folder}");
    }
}
