/*
 * Reads 3MF files with lib3mf in strict mode, where every warning is an error, and prints one line a file:
 * "ok <objects> valid <valid> items <items>" or "error <code> <words>". Objects are valid when their edges pair.
 * Plain C interface of lib3mf 1.8 (Debian packages lib3mf1, lib3mf-dev); its header is C++, so what is used is declared
 * here. Build: cc lib3mf-strict.c -l3MF
 */
#include <stdint.h>
#include <stdio.h>

typedef void *Handle;
int32_t lib3mf_createmodel(Handle *);
int32_t lib3mf_release(Handle);
int32_t lib3mf_getlasterror(Handle, uint32_t *, const char **);
int32_t lib3mf_model_queryreader(Handle, const char *, Handle *);
int32_t lib3mf_model_getobjects(Handle, Handle *);
int32_t lib3mf_model_getbuilditems(Handle, Handle *);
int32_t lib3mf_reader_setstrictmodeactive(Handle, int);
int32_t lib3mf_reader_readfromfileutf8(Handle, const char *);
int32_t lib3mf_reader_getwarningcount(Handle, uint32_t *);
int32_t lib3mf_resourceiterator_movenext(Handle, int *);
int32_t lib3mf_resourceiterator_getcurrent(Handle, Handle *);
int32_t lib3mf_builditemiterator_movenext(Handle, int *);
int32_t lib3mf_object_isvalidobject(Handle, int *);

static int fail(Handle where) {
  uint32_t code = 0;
  const char *words = "";
  lib3mf_getlasterror(where, &code, &words);
  printf("error %x %s\n", code, words ? words : "");
  return 1;
}

static int judge(const char *path) {
  Handle model, reader, objects, items;
  uint32_t warnings = 0;
  int found = 0, count = 0, valid = 0, placed = 0;
  if (lib3mf_createmodel(&model)) return fail(model);
  if (lib3mf_model_queryreader(model, "3mf", &reader)) return fail(model);
  if (lib3mf_reader_setstrictmodeactive(reader, 1)) return fail(reader);
  if (lib3mf_reader_readfromfileutf8(reader, path)) return fail(reader);
  if (lib3mf_reader_getwarningcount(reader, &warnings)) return fail(reader);
  if (warnings > 0) return printf("error warnings %u\n", warnings), 1;
  if (lib3mf_model_getobjects(model, &objects)) return fail(model);
  while (!lib3mf_resourceiterator_movenext(objects, &found) && found) {
    Handle object;
    int sound = 0;
    if (lib3mf_resourceiterator_getcurrent(objects, &object)) return fail(objects);
    if (lib3mf_object_isvalidobject(object, &sound)) return fail(object);
    count++;
    valid += sound ? 1 : 0;
    lib3mf_release(object);
  }
  if (lib3mf_model_getbuilditems(model, &items)) return fail(model);
  while (!lib3mf_builditemiterator_movenext(items, &found) && found) placed++;
  printf("ok %d valid %d items %d\n", count, valid, placed);
  lib3mf_release(items);
  lib3mf_release(objects);
  lib3mf_release(reader);
  lib3mf_release(model);
  return 0;
}

int main(int count, char **paths) {
  int failures = 0;
  for (int i = 1; i < count; i++) failures += judge(paths[i]);
  return failures > 0;
}
