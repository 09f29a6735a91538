# summerlow.  `make help` lists the targets.

VERSION := $(shell sed -n 's/^.define SL_VERSION "\(.*\)"/\1/p' \
             include/app/options.h)

# MODE=release (the default) or MODE=sanitize; each has its own objects.
MODE ?= release
OUT := build/$(MODE)
GENERATED := build/generated

prefix ?= /usr/local
bindir ?= $(prefix)/bin
mandir ?= $(prefix)/share/man
DESTDIR ?=

CC ?= cc
WARNINGS := -Wall -Wextra -Wpedantic -Wshadow -Wconversion -Wvla \
            -Wstrict-prototypes -Wmissing-prototypes -Wold-style-definition \
            -Wformat=2 -Wundef -Werror
HARDENING := -fstack-protector-strong -fPIE
ifeq ($(MODE),sanitize)
OPTIMISE := -O1 -g -fsanitize=address,undefined -fno-sanitize-recover=all \
            -fno-omit-frame-pointer
LINKING := -fsanitize=address,undefined
else
OPTIMISE := -O2 -g -D_FORTIFY_SOURCE=2
LINKING := -pie -Wl,-z,relro,-z,now
endif
CFLAGS := -std=c17 $(WARNINGS) $(HARDENING) $(OPTIMISE)
CPPFLAGS := -Iinclude -I$(GENERATED) -Itests
LIBRARIES := -lsqlite3 -lcsv -lmd -lm

ROOMS := base model hydraulics store importer evaluator ranker app
SOURCES := $(foreach room,$(ROOMS),$(wildcard src/$(room)/*.c))
CATALOGUE := $(GENERATED)/store/catalogue.c
STYLE := $(GENERATED)/ranker/style.h
OBJECTS := $(SOURCES:%.c=$(OUT)/%.o) $(OUT)/catalogue.o
LIBRARY_OBJECTS := $(filter-out $(OUT)/src/app/main.o,$(OBJECTS))
SQL := $(wildcard sql/*/*.sql)

TEST_SOURCES := $(wildcard tests/unit/*_test.c)
TESTS := $(TEST_SOURCES:tests/unit/%.c=$(OUT)/tests/%)
FUZZERS := $(OUT)/tests/importer_fuzz
FUZZ_CORPUS := $(wildcard tests/importer/*/*.csv)

# What Debian calls the things we need.
NEEDED_TO_BUILD := gcc libc6-dev libsqlite3-dev libcsv-dev libmd-dev
NEEDED_TO_TEST := $(NEEDED_TO_BUILD) libcmocka-dev sqlite3

.DELETE_ON_ERROR:
.SUFFIXES:
.PHONY: all help demo test check unit cli examples recompute bench compare \
        clean install uninstall tidy sample needed-to-build needed-to-test

all: needed-to-build ## build the program (the default)
	@$(MAKE) --no-print-directory $(OUT)/summerlow
	@echo "built $(OUT)/summerlow; try: make demo"

help: ## this list
	@echo "summerlow $(VERSION)"
	@sed -n 's/^\([a-z][a-z-]*\):.*## \(.*\)/  make \1|\2/p' Makefile \
	    | awk -F'|' '{ printf "%-16s %s\n", $$1, $$2 }'
	@echo "MODE=sanitize builds and tests with address and undefined-"
	@echo "behaviour sanitizers."

demo: all ## install what is missing, build, audit the sample inventory
	@rm -rf build/demo
	@$(OUT)/summerlow audit sample-inventory --out build/demo \
	    || test $$? -eq 1
	@echo "Open build/demo/report.html in a browser."

test: needed-to-test ## install what is missing, build, pass every test
	@$(MAKE) --no-print-directory check unit cli examples

# --- what is missing -------------------------------------------------------

# $(call need,PACKAGES): install those of the Debian packages that are not.
define need
missing=""; \
for package in $(1); do \
    dpkg-query -W -f='$${Status}' $$package 2>/dev/null \
        | grep -q '^install ok installed$$' || missing="$$missing $$package"; \
done; \
test -z "$$missing" && exit 0; \
if [ "$$(id -u)" = 0 ]; then as=""; \
elif sudo -n true 2>/dev/null; then as="sudo"; \
else echo "These packages are missing; install them, then try again:"; \
    echo "  su -c 'apt-get update && apt-get install -y$$missing'"; exit 1; \
fi; \
echo "installing$$missing"; \
$$as apt-get update -qq && \
$$as env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq $$missing \
    >/dev/null
endef

needed-to-build:
	@$(call need,$(NEEDED_TO_BUILD))

needed-to-test:
	@$(call need,$(NEEDED_TO_TEST))

# --- building --------------------------------------------------------------

# The folders stand for the files that were taken out of them.
$(OUT)/summerlow: $(OBJECTS) $(ROOMS:%=src/%)
	@echo "ld $@"
	@$(CC) $(LINKING) -o $@ $(OBJECTS) $(LIBRARIES)

$(OUT)/%.o: %.c | $(CATALOGUE) $(STYLE)
	@mkdir -p $(@D)
	@echo "cc $<"
	@$(CC) $(CPPFLAGS) $(CFLAGS) -MMD -MP -c -o $@ $<

$(OUT)/catalogue.o: $(CATALOGUE)
	@mkdir -p $(@D)
	@$(CC) $(CPPFLAGS) $(CFLAGS) -Wno-overlength-strings -MMD -MP -c -o $@ $<

$(CATALOGUE): $(SQL) $(wildcard sql/*) src/store/embed.sh
	@sh src/store/embed.sh $(GENERATED)

$(STYLE): src/ranker/report.css src/ranker/embed.sh
	@sh src/ranker/embed.sh $(@D)

# --- testing ---------------------------------------------------------------

.SECONDARY:
$(OUT)/tests/%: $(OUT)/tests/unit/%.o $(LIBRARY_OBJECTS)
	@echo "ld $@"
	@$(CC) $(LINKING) -o $@ $^ $(LIBRARIES) -lcmocka

check: $(OUT)/summerlow ## the walls, headers, keys and texts
	@for script in tests/checks/*.sh; do sh $$script || exit 1; done

unit: $(TESTS) $(FUZZERS) ## the unit and reference tests
	@for test in $(TESTS); do echo "== $$test"; $$test || exit 1; done
	$(OUT)/tests/importer_fuzz $(FUZZ_CORPUS)

cli: $(OUT)/summerlow ## the command-line cases
	@sh tests/cli/run.sh $(OUT)/summerlow

examples: $(OUT)/summerlow ## published worked examples, CSV in, CSV out
	@sh tests/examples/run.sh $(OUT)/summerlow
	@sh tests/sample/governs.sh $(OUT)/summerlow sample-inventory

# A second implementation on general-purpose libraries; see
# docs/verification.md.
NEEDED_TO_RECOMPUTE := python3 python3-iapws python3-fluids python3-scipy

recompute: all ## work every pump out anew by other libraries, and compare
	@$(call need,$(NEEDED_TO_RECOMPUTE))
	@sh tests/independent/recompute.sh $(OUT)/summerlow build/recompute

# How much work an evaluation is; see docs/performance.md.
NEEDED_TO_BENCH := $(NEEDED_TO_RECOMPUTE) valgrind

bench: all ## measure the evaluation against the second implementation
	@$(call need,$(NEEDED_TO_BENCH))
	@$(MAKE) --no-print-directory $(OUT)/evaluate_bench
	@/usr/bin/python3 tests/bench/bench.py $(OUT)/summerlow \
	    $(OUT)/evaluate_bench build/bench

$(OUT)/evaluate_bench: $(OUT)/tests/bench/evaluate_bench.o $(LIBRARY_OBJECTS)
	@echo "ld $@"
	@$(CC) $(LINKING) -o $@ $^ $(LIBRARIES)

# The hydraulics alone against such libraries, over whole ranges.
NEEDED_TO_COMPARE := $(NEEDED_TO_RECOMPUTE) python3-gsw
HYDRAULICS := build/compare/hydraulics.so

compare: needed-to-build ## hold the hydraulics to reference libraries
	@$(call need,$(NEEDED_TO_COMPARE))
	@$(MAKE) --no-print-directory $(HYDRAULICS)
	@/usr/bin/python3 tests/reference/compare.py $(HYDRAULICS)

$(HYDRAULICS): $(wildcard src/hydraulics/*.c include/*/*.h)
	@mkdir -p $(@D)
	@echo "ld $@"
	@$(CC) -std=c17 $(WARNINGS) -O2 -fPIC -shared $(CPPFLAGS) -o $@ \
	    $(filter %.c,$^) -lm

# --- the rest --------------------------------------------------------------

sample: ## make the sample inventory anew
	python3 tests/sample/generate.py sample-inventory

install: all ## install into DESTDIR and prefix
	install -d "$(DESTDIR)$(bindir)" "$(DESTDIR)$(mandir)/man1"
	install -m 755 $(OUT)/summerlow "$(DESTDIR)$(bindir)/summerlow"
	install -m 644 docs/summerlow.1 \
	    "$(DESTDIR)$(mandir)/man1/summerlow.1"

uninstall: ## take out what install put in
	rm -f "$(DESTDIR)$(bindir)/summerlow" \
	    "$(DESTDIR)$(mandir)/man1/summerlow.1"

tidy: ## format the code
	clang-format -i include/*/*.h src/*/*.c tests/unit/*.[ch]

clean: ## remove what was built
	rm -rf build

-include $(OBJECTS:.o=.d) \
    $(patsubst $(OUT)/tests/%,$(OUT)/tests/unit/%.d,$(TESTS) $(FUZZERS)) \
    $(OUT)/tests/bench/evaluate_bench.d
