"""Reads a 3MF file with lib3mf, the reference implementation (Debian package lib3mf1), through its C interface, and with xmlschema.

read-3mf.py FILE.3mf [SCHEMA.xsd]: prints what both say as JSON.
"""
import ctypes
import json
import sys
import zipfile

lib = ctypes.CDLL('lib3MF.so.1')
P, U, B = ctypes.c_void_p, ctypes.c_uint32, ctypes.c_bool


def call(name, *args):
    f = getattr(lib, name)
    f.restype = ctypes.c_int32
    status = f(*args)
    if status != 0:
        raise RuntimeError(f'{name}: {status & 0xffffffff:#x}')


def text(name, owner):
    size = U()
    buffer = ctypes.create_string_buffer(4096)
    call(name, owner, buffer, U(4096), ctypes.byref(size))
    return buffer.value.decode('utf-8')


def number(name, owner, kind=U):
    value = kind()
    call(name, owner, ctypes.byref(value))
    return value.value


def each(owner, query):
    iterator = P()
    call(query, owner, ctypes.byref(iterator))
    kind = 'lib3mf_builditemiterator' if 'build' in query else 'lib3mf_resourceiterator'
    while number(f'{kind}_movenext', iterator, B):
        current = P()
        call(f'{kind}_getcurrent', iterator, ctypes.byref(current))
        yield current




def read(path):
    model = P()
    call('lib3mf_createmodel', ctypes.byref(model))
    reader = P()
    call('lib3mf_model_queryreader', model, b'3mf', ctypes.byref(reader))
    call('lib3mf_reader_setstrictmodeactive', reader, B(True))
    call('lib3mf_reader_readfromfileutf8', reader, path.encode())
    picture = P()
    call('lib3mf_model_getpackagethumbnailattachment', model, B(False), ctypes.byref(picture))
    return {
        'warnings': number('lib3mf_reader_getwarningcount', reader),
        'thumbnail': bool(picture.value),
        'objects': [
            {
                'name': text('lib3mf_object_getnameutf8', m),
                'part': text('lib3mf_object_getpartnumberutf8', m),
                'picture': text('lib3mf_object_getthumbnailpathutf8', m),
                'vertices': number('lib3mf_meshobject_getvertexcount', m),
                'triangles': number('lib3mf_meshobject_gettrianglecount', m),
                'closed': number('lib3mf_meshobject_ismanifoldandoriented', m, B),
            }
            for m in each(model, 'lib3mf_model_getmeshobjects')
        ],
        'items': [text('lib3mf_builditem_getpartnumberutf8', i) for i in each(model, 'lib3mf_model_getbuilditems')],
    }


path = sys.argv[1]
try:
    said = read(path)
except RuntimeError as error:
    said = {'refused': str(error)}
if len(sys.argv) > 2:
    import xmlschema

    schema = xmlschema.XMLSchema(sys.argv[2])
    part = zipfile.ZipFile(path).read('3D/3dmodel.model').decode('utf-8')
    said['schema'] = [e.reason for e in schema.iter_errors(part)]
print(json.dumps(said))
