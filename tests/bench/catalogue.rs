//! Time and memory of the catalogue: `cargo bench --bench catalogue`.
//!
//! Memory is counted at the allocator; times are of one cold run, as a start of the
//! program sees them.

use std::alloc::{GlobalAlloc, Layout, System};
use std::hint::black_box;
use std::sync::atomic::{AtomicUsize, Ordering};
use std::time::Instant;

use chargewright::fluid::Catalog;

/// What everything read, with its curves, may take at most.
const MOST_BYTES: usize = 8 << 20;

struct Counting;

static HELD: AtomicUsize = AtomicUsize::new(0);
static PEAK: AtomicUsize = AtomicUsize::new(0);

// SAFETY: every call is handed on to the system's allocator as it is; only sizes are added up.
unsafe impl GlobalAlloc for Counting {
    unsafe fn alloc(&self, layout: Layout) -> *mut u8 {
        let held = HELD.fetch_add(layout.size(), Ordering::Relaxed) + layout.size();
        PEAK.fetch_max(held, Ordering::Relaxed);
        unsafe { System.alloc(layout) }
    }

    unsafe fn dealloc(&self, pointer: *mut u8, layout: Layout) {
        HELD.fetch_sub(layout.size(), Ordering::Relaxed);
        unsafe { System.dealloc(pointer, layout) }
    }
}

#[global_allocator]
static ALLOCATOR: Counting = Counting;

fn main() {
    let before = HELD.load(Ordering::Relaxed);
    let catalog = Catalog::built_in();
    let fluids = catalog.entries().count();
    println!("{fluids} fluids");
    timed("list every name, read nothing", || {
        black_box(
            catalog
                .entries()
                .map(|entry| entry.name().len())
                .sum::<usize>(),
        );
    });
    timed("find one by CAS number, cold", || {
        black_box(catalog.find("811-97-2").expect("known"));
    });
    timed("find it again", || {
        black_box(catalog.find("811-97-2").expect("known"));
    });
    timed("find nothing, with the nearest name", || {
        black_box(catalog.find("no such fluid").is_err());
    });
    timed("read the others", || {
        black_box(catalog.iter().count());
    });
    report(
        "held by all that is read",
        HELD.load(Ordering::Relaxed) - before,
    );
    timed("build every saturation curve", || catalog.read_all());
    report("held with curves", HELD.load(Ordering::Relaxed) - before);
    let peak = PEAK.load(Ordering::Relaxed) - before;
    report("at most held meanwhile", peak);
    assert!(peak <= MOST_BYTES, "more than {} MiB", MOST_BYTES >> 20);
}

fn timed(what: &str, work: impl FnOnce()) {
    let start = Instant::now();
    work();
    println!("{what:<40} {:>9.3} ms", 1e3 * start.elapsed().as_secs_f64());
}

fn report(what: &str, bytes: usize) {
    println!("{what:<40} {:>9.3} MiB", bytes as f64 / f64::from(1 << 20));
}
