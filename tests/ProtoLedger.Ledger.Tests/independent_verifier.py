#!/usr/bin/env python3
"""A second verifier of ProtoLedger bundles, written from docs/bundle-format.md alone.

It shares no code and no library with the product: Python's standard library, Ed25519 from the text of RFC 8032, and the
openssl program for certificates, revocation lists and CMS signatures. Slow and plain on purpose.

    independent_verifier.py BUNDLE [--trust DIR] [--checkpoint FILE]     prints what is wrong; exit code 0, 1, 2 or 3
    independent_verifier.py --flips BUNDLE --trust DIR                   flips each byte once; prints one digit a byte
    independent_verifier.py --cases DIR                                  DIR/*/bundle.zip [trust/] [checkpoint.txt]; JSON
"""
import base64
import datetime
import hashlib
import json
import os
import re
import struct
import subprocess
import sys
import tempfile
import zlib

GOOD, BAD, USAGE, ORIGIN_UNKNOWN = 0, 1, 2, 3


class Bad(Exception):
    """Something in the bundle is wrong: (entry, detail)."""


# --- Ed25519, RFC 8032 section 6 -------------------------------------------------------------------------------------

P = 2**255 - 19
Q = 2**252 + 27742317777372353535851937790883648493
D = -121665 * pow(121666, P - 2, P) % P
SQRT_M1 = pow(2, (P - 1) // 4, P)


def point_add(a, b):
    x1, y1, z1, t1 = a
    x2, y2, z2, t2 = b
    m, n = (y1 - x1) * (y2 - x2) % P, (y1 + x1) * (y2 + x2) % P
    c, d = 2 * t1 * t2 * D % P, 2 * z1 * z2 % P
    e, f, g, h = n - m, d - c, d + c, n + m
    return e * f % P, g * h % P, f * g % P, e * h % P


def point_mul(s, point):
    result = (0, 1, 1, 0)
    while s > 0:
        if s & 1:
            result = point_add(result, point)
        point = point_add(point, point)
        s >>= 1
    return result


def recover_x(y, sign):
    if y >= P:
        return None
    x2 = (y * y - 1) * pow(D * y * y + 1, P - 2, P) % P
    if x2 == 0:
        return None if sign else 0
    x = pow(x2, (P + 3) // 8, P)
    if (x * x - x2) % P != 0:
        x = x * SQRT_M1 % P
    if (x * x - x2) % P != 0:
        return None
    return P - x if (x & 1) != sign else x


def decompress(raw):
    y = int.from_bytes(raw, "little")
    sign, y = y >> 255, y & ((1 << 255) - 1)
    x = recover_x(y, sign)
    return None if x is None else (x, y, 1, x * y % P)


BASE_Y = 4 * pow(5, P - 2, P) % P
BASE_X = recover_x(BASE_Y, 0)
BASE = (BASE_X, BASE_Y, 1, BASE_X * BASE_Y % P)


def ed25519_verify(public, message, signature):
    if len(public) != 32 or len(signature) != 64:
        return False
    a, r = decompress(public), decompress(signature[:32])
    s = int.from_bytes(signature[32:], "little")
    if a is None or r is None or s >= Q:
        return False
    h = int.from_bytes(hashlib.sha512(signature[:32] + public + message).digest(), "little") % Q
    left, right = point_mul(s, BASE), point_add(r, point_mul(h, a))
    return ((left[0] * right[2] - right[0] * left[2]) % P == 0
            and (left[1] * right[2] - right[1] * left[2]) % P == 0)


# --- Notes and checkpoints (C2SP signed-note, tlog-checkpoint, tlog-cosignature) -------------------------------------

def strict_base64(text):
    try:
        raw = base64.b64decode(text, validate=True)
    except (ValueError, TypeError):
        return None
    return raw if base64.b64encode(raw).decode() == text else None


class Key:
    def __init__(self, text):
        parts = text.split("+", 2)
        raw = strict_base64(parts[2]) if len(parts) == 3 else None
        if raw is None or len(raw) != 33 or raw[0] not in (1, 4) or not is_key_name(parts[0]):
            raise ValueError("no note key")
        self.text, self.name, self.witness, self.public = text, parts[0], raw[0] == 4, raw[1:]
        self.id = hashlib.sha256(self.name.encode() + b"\n" + raw).digest()[:4]
        if parts[1] != self.id.hex():
            raise ValueError("the key id does not fit")

    def verify(self, text, signature):
        if not self.witness:
            return ed25519_verify(self.public, text.encode(), signature)
        if len(signature) != 72:
            return False
        time = struct.unpack(">Q", signature[:8])[0]
        return ed25519_verify(self.public, f"cosignature/v1\ntime {time}\n{text}".encode(), signature[8:])


def is_key_name(name):
    return bool(name) and "+" not in name and not any(c.isspace() or ord(c) < 32 or ord(c) == 127 for c in name)


def parse_note(raw):
    try:
        text = raw.decode("utf-8")
    except UnicodeDecodeError:
        raise ValueError("not UTF-8")
    if len(raw) > 65536 or any((ord(c) < 32 and c != "\n") or 127 <= ord(c) < 160 for c in text):
        raise ValueError("control character or too long")
    border = text.rfind("\n\n")
    if border < 0 or not text.endswith("\n"):
        raise ValueError("no signatures")
    lines = text[border + 2:].split("\n")[:-1]
    signatures = []
    for line in lines:
        parts = line[2:].split(" ") if line.startswith("\u2014 ") else []
        raw_signature = strict_base64(parts[1]) if len(parts) == 2 and is_key_name(parts[0]) else None
        if raw_signature is None or len(raw_signature) < 5:
            raise ValueError("malformed signature line")
        signatures.append((parts[0], raw_signature[:4], raw_signature[4:]))
    if not 1 <= len(signatures) <= 64:
        raise ValueError("1 to 64 signatures")
    return text[:border + 1], signatures


def note_refusal(note, keys):
    text, signatures = note
    good = []
    for name, key_id, signature in signatures:
        for key in keys:
            if key.name == name and key.id == key_id:
                if not key.verify(text, signature):
                    return f"the signature of {name} is wrong"
                good.append(key)
    if not any(not key.witness for key in good):
        return "no known log key signed it"
    return None


def parse_checkpoint(text):
    lines = text.split("\n")
    if len(lines) != 4 or lines[3]:
        raise ValueError("a checkpoint has three lines")
    origin, size, root = lines[0], lines[1], strict_base64(lines[2])
    if not origin or origin.strip() != origin or "+" in origin:
        raise ValueError("origin")
    if not re.fullmatch(r"0|[1-9][0-9]*", size, re.ASCII) or int(size) >= 2**63:
        raise ValueError("size")
    if root is None or len(root) != 32:
        raise ValueError("root")
    return origin, int(size), root


# --- Canonical JSON (RFC 8785, without fractions, true, false, null) -------------------------------------------------

def canonical(value):
    if isinstance(value, dict):
        keys = sorted(value, key=lambda k: k.encode("utf-16-be"))
        return "{" + ",".join(json.dumps(k, ensure_ascii=False) + ":" + canonical(value[k]) for k in keys) + "}"
    if isinstance(value, list):
        return "[" + ",".join(canonical(item) for item in value) + "]"
    return json.dumps(value, ensure_ascii=False)


def unique(pairs):
    result = dict(pairs)
    if len(result) != len(pairs):
        raise ValueError("a name occurs twice")
    return result


def whole(text):
    number = int(text)
    if abs(number) >= 2**53:
        raise ValueError("number too large")
    return number


def refuse(_):
    raise ValueError("only objects, lists, texts and whole numbers")


def all_plain(value):
    if isinstance(value, dict):
        return all(all_plain(v) for v in value.values())
    if isinstance(value, list):
        return all(all_plain(v) for v in value)
    return isinstance(value, str) or (isinstance(value, int) and not isinstance(value, bool))


def parse_json(raw, members):
    try:
        value = json.loads(raw.decode("utf-8"), object_pairs_hook=unique, parse_int=whole, parse_float=refuse, parse_constant=refuse)
        if not isinstance(value, dict) or set(value) != set(members) or not all_plain(value) or canonical(value).encode() != raw:
            raise ValueError("not canonical, or other members")
        return value
    except (ValueError, RecursionError, UnicodeError) as fault:
        raise ValueError(str(fault))


def demand(condition, words):
    if not condition:
        raise ValueError(words)


def is_hash(text):
    return isinstance(text, str) and re.fullmatch(r"[0-9a-f]{64}", text) is not None


def parse_time(text):
    demand(isinstance(text, str) and re.fullmatch(r"\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{6}Z", text, re.ASCII), "time")
    return datetime.datetime.strptime(text, "%Y-%m-%dT%H:%M:%S.%fZ").replace(tzinfo=datetime.timezone.utc)


def parse_leaf(raw):
    leaf = parse_json(raw, ["actor", "blobs", "subject", "time", "type", "v"])
    demand(isinstance(leaf["type"], str) and re.fullmatch(r"[a-z0-9-]{1,100}", leaf["type"]), "type")
    demand(isinstance(leaf["v"], int) and 1 <= leaf["v"] < 2**31, "v")
    demand(all(isinstance(leaf[n], str) and leaf[n] for n in ("actor", "subject")), "actor or subject")
    demand(isinstance(leaf["blobs"], dict) and all(k and is_hash(v) for k, v in leaf["blobs"].items()), "blobs")
    leaf["time"] = parse_time(leaf["time"])
    return leaf


MEANINGS = ["authored", "reviewed", "approved", "clinically accepted", "ready to load", "as found", "periodically reviewed"]


def parse_manifest(raw):
    manifest = parse_json(raw, ["account", "artefacts", "certificate", "checkpoint", "displayName", "format", "kind",
                                "meaning", "modelId", "role", "subject", "time"])
    demand(manifest["format"] == 1 and manifest["kind"] == "protoledger-signature", "kind")
    demand(all(isinstance(manifest[n], str) and manifest[n].strip() for n in ("account", "displayName", "role", "modelId", "subject")), "text")
    demand(manifest["meaning"] in MEANINGS, "meaning")
    demand(isinstance(manifest["artefacts"], dict) and manifest["artefacts"]
           and all(k.strip() and is_hash(v) for k, v in manifest["artefacts"].items()), "artefacts")
    demand(is_hash(manifest["certificate"]), "certificate")
    checkpoint = manifest["checkpoint"]
    demand(isinstance(checkpoint, dict) and set(checkpoint) == {"origin", "root", "size"} and is_hash(checkpoint["root"])
           and isinstance(checkpoint["size"], int) and checkpoint["size"] >= 0 and isinstance(checkpoint["origin"], str) and checkpoint["origin"], "checkpoint")
    manifest["time"] = parse_time(manifest["time"])
    return manifest


# --- The zip file ----------------------------------------------------------------------------------------------------

TOP = {"bundle.json", "bundle.note", "SHA256SUMS", "index.html", "site-ca.pem", "revocations.crl",
       "ledger/leaves.jsonl", "ledger/checkpoint.txt", "ledger/log.vkey"}


def name_allowed(name):
    parts = name.split("/")
    return (len(name) <= 200 and all(re.fullmatch(r"[A-Za-z0-9_-]|[A-Za-z0-9_-][A-Za-z0-9._-]*[A-Za-z0-9_-]", part, re.ASCII) for part in parts)
            and (name in TOP or name.startswith(("blobs/", "signatures/", "pages/"))))


def read_zip(raw):
    entries, central, at, seen = [], b"", 0, set()
    while raw[at:at + 4] == b"PK\x03\x04":
        if at + 30 > len(raw):
            raise Bad("zip", "cut")
        crc, size = struct.unpack("<I", raw[at + 14:at + 18])[0], struct.unpack("<I", raw[at + 22:at + 26])[0]
        length = struct.unpack("<H", raw[at + 26:at + 28])[0]
        name_bytes = raw[at + 30:at + 30 + length]
        name = name_bytes.decode("latin-1")
        if len(name_bytes) != length or not name_allowed(name) or name.lower() in seen:
            raise Bad(name, "name")
        seen.add(name.lower())
        common = struct.pack("<HHHHHIIIHH", 10, 0, 0, 0, 0x21, crc, size, size, length, 0)
        if raw[at + 4:at + 30] != common:
            raise Bad(name, "zip header")
        content = raw[at + 30 + length:at + 30 + length + size]
        if len(content) != size or zlib.crc32(content) != crc:
            raise Bad(name, "checksum")
        central += b"PK\x01\x02" + struct.pack("<H", 10) + common + struct.pack("<HHHII", 0, 0, 0, 0, at) + name_bytes
        entries.append((name, content))
        at += 30 + length + size
    end = b"PK\x05\x06" + struct.pack("<HHHHIIH", 0, 0, len(entries), len(entries), len(central), at, 0)
    if raw[at:] != central + end:
        raise Bad("zip directory", "not the only one that fits")
    return entries


# --- The checks ------------------------------------------------------------------------------------------------------

def leaf_hash(raw):
    return hashlib.sha256(b"\0" + raw).digest()


def merkle_root(hashes):
    """RFC 9162 section 2.1.1, recursive; hashes of leaves."""
    if not hashes:
        return hashlib.sha256(b"").digest()
    if len(hashes) == 1:
        return hashes[0]
    k = 1
    while k * 2 < len(hashes):
        k *= 2
    return hashlib.sha256(b"\1" + merkle_root(hashes[:k]) + merkle_root(hashes[k:])).digest()


class Verifier:
    def __init__(self, raw, authorities, keys, outside):
        self.raw, self.authorities, self.keys, self.outside = raw, authorities, keys, outside
        self.unknown = False

    def entry(self, name):
        if name not in self.files:
            raise Bad(name, "missing")
        return self.files[name]

    def run(self):
        entries = read_zip(self.raw)
        self.files = dict(entries)
        self.check_index([name for name, _ in entries])
        self.choose_keys()
        self.check_note("bundle.note", f"{self.index['origin']} bundle\nsha256 {hashlib.sha256(self.files['bundle.json']).hexdigest()}\n")
        self.check_ledger()
        self.check_blobs()
        self.check_outside()
        self.check_signatures()
        return ORIGIN_UNKNOWN if self.unknown else GOOD

    def check_index(self, names):
        self.index = self.guard("bundle.json", lambda: parse_json(self.entry("bundle.json"), ["entries", "format", "kind", "origin", "scope", "title"]))
        index = self.index
        if index["format"] != 1 or index["kind"] != "protoledger-bundle" or not isinstance(index["entries"], list):
            raise Bad("bundle.json", "kind")
        for item in index["entries"]:
            if not isinstance(item, dict) or set(item) != {"name", "sha256", "size"}:
                raise Bad("bundle.json", "entries")
        listed = [item["name"] for item in index["entries"]]
        if listed + ["bundle.json", "bundle.note"] != names:
            raise Bad("bundle.json", "the list and the file differ")
        sums = ""
        for item in index["entries"]:
            content = self.files[item["name"]]
            if item["size"] != len(content) or item["sha256"] != hashlib.sha256(content).hexdigest():
                raise Bad(item["name"], "hash")
            if item["name"] != "SHA256SUMS":
                sums += f"{item['sha256']}  {item['name']}\n"
        if self.entry("SHA256SUMS") != sums.encode():
            raise Bad("SHA256SUMS", "differs from bundle.json")

    def guard(self, name, parse):
        try:
            return parse()
        except ValueError as fault:
            raise Bad(name, str(fault))

    def choose_keys(self):
        raw = self.entry("ledger/log.vkey")
        own = self.guard("ledger/log.vkey", lambda: Key(raw.decode("utf-8")[:-1]))
        if raw != own.text.encode() + b"\n" or own.witness or own.name != self.index["origin"]:
            raise Bad("ledger/log.vkey", "not the log's key")
        logs = [key for key in self.keys if not key.witness]
        if not logs:
            self.unknown = True
        elif own.text not in [key.text for key in logs]:
            raise Bad("ledger/log.vkey", "not trusted")
        self.log_keys = [own] + [key for key in self.keys if key.witness]

    def check_note(self, name, text=None):
        note = self.guard(name, lambda: parse_note(self.entry(name)))
        if text is not None and note[0] != text:
            raise Bad(name, "signs something else")
        refusal = note_refusal(note, self.log_keys)
        if refusal:
            raise Bad(name, refusal)
        return note

    def check_ledger(self):
        note = self.check_note("ledger/checkpoint.txt")
        origin, size, root = self.guard("ledger/checkpoint.txt", lambda: parse_checkpoint(note[0]))
        if origin != self.index["origin"]:
            raise Bad("ledger/checkpoint.txt", "origin")
        raw = self.entry("ledger/leaves.jsonl")
        lines = raw.split(b"\n")
        if lines[-1] != b"":
            raise Bad("ledger/leaves.jsonl", "no line feed at the end")
        self.leaves = [self.guard("ledger/leaves.jsonl", lambda: parse_leaf(line)) for line in lines[:-1]]
        self.hashes = [leaf_hash(line) for line in lines[:-1]]
        if len(self.leaves) != size or merkle_root(self.hashes) != root:
            raise Bad("ledger/leaves.jsonl", "the leaves do not give the checkpoint")
        self.origin = origin

    def check_blobs(self):
        referred = {h for leaf in self.leaves for h in leaf["blobs"].values()}
        for name, content in self.files.items():
            if name.startswith("blobs/"):
                if name[6:] != hashlib.sha256(content).hexdigest() or name[6:] not in referred:
                    raise Bad(name, "hash, or no leaf refers to it")

    def check_outside(self):
        if self.outside is None:
            return
        note, (origin, size, root) = self.outside
        if origin != self.origin or note_refusal(note, self.log_keys) or size > len(self.leaves) or merkle_root(self.hashes[:size]) != root:
            raise Bad("your checkpoint", "the bundle does not extend it")

    # Certificates and signatures, by openssl.

    def check_signatures(self):
        pem = self.entry("site-ca.pem")
        match = re.fullmatch(rb"-----BEGIN CERTIFICATE-----\n((?:[A-Za-z0-9+/=]{1,64}\n)+)-----END CERTIFICATE-----\n", pem)
        der = strict_base64(match.group(1).decode().replace("\n", "")) if match else None
        if der is None or any(len(line) != 64 for line in match.group(1).split(b"\n")[:-2]):
            raise Bad("site-ca.pem", "not one certificate")
        fingerprint = hashlib.sha256(der).hexdigest()
        if not self.authorities:
            self.unknown = True
        elif fingerprint not in self.authorities:
            raise Bad("site-ca.pem", "not trusted")
        with tempfile.TemporaryDirectory() as self.folder:
            self.write("site-ca.pem", pem)
            self.check_authority()
            self.read_revocations()
            folders = {}
            for name in self.files:
                if name.startswith("signatures/"):
                    parts = name.split("/")
                    if len(parts) != 3 or not re.fullmatch(r"0|[1-9][0-9]*", parts[1], re.ASCII):
                        raise Bad(name, "in no signature's folder")
                    folders.setdefault(int(parts[1]), []).append(parts[2])
            for number, names in folders.items():
                self.check_signature(number, names)
        recorded = [leaf["blobs"]["approval.p7s"] for leaf in self.leaves if "approval.p7s" in leaf["blobs"]]
        if len(recorded) != len(set(recorded)):
            raise Bad("ledger/leaves.jsonl", "a signature is recorded twice")

    def write(self, name, content):
        with open(os.path.join(self.folder, name), "wb") as file:
            file.write(content)

    def openssl(self, *arguments):
        done = subprocess.run(["openssl", *arguments], cwd=self.folder, capture_output=True)
        return done.returncode, (done.stdout + done.stderr).decode("utf-8", "replace")

    def check_authority(self):
        code, text = self.openssl("x509", "-in", "site-ca.pem", "-noout", "-ext", "basicConstraints,keyUsage")
        if code or "CA:TRUE" not in text or "Certificate Sign" not in text or "CRL Sign" not in text:
            raise Bad("site-ca.pem", "no authority")

    def read_revocations(self):
        raw = self.entry("revocations.crl")
        self.write("revocations.crl", raw)
        code, text = self.openssl("crl", "-inform", "DER", "-in", "revocations.crl", "-CAfile", "site-ca.pem", "-noout", "-text")
        again, _ = self.openssl("crl", "-inform", "DER", "-in", "revocations.crl", "-outform", "DER", "-out", "again.crl")
        if code or again or "verify OK" not in text:
            raise Bad("revocations.crl", "not signed by the authority")
        with open(os.path.join(self.folder, "again.crl"), "rb") as file:
            if file.read() != raw:
                raise Bad("revocations.crl", "not DER")
        clock = lambda words: datetime.datetime.strptime(re.sub(r"\s+", " ", words), "%b %d %H:%M:%S %Y GMT").replace(tzinfo=datetime.timezone.utc)
        self.list_time = clock(re.search(r"Last Update: (.*)", text).group(1))
        self.revoked = [(int(serial, 16), clock(when)) for serial, when in
                        re.findall(r"Serial Number: ([0-9A-F]+)\s+Revocation Date: (.*)", text)]

    def check_signature(self, number, names):
        prefix = f"signatures/{number}/"
        raw, cms = self.entry(prefix + "manifest.json"), self.entry(prefix + "approval.p7s")
        leaf = self.leaves[number] if number < len(self.leaves) else {"blobs": {}}
        blobs = leaf["blobs"]
        if (blobs.get("manifest.json") != hashlib.sha256(raw).hexdigest()
                or blobs.get("approval.p7s") != hashlib.sha256(cms).hexdigest() or "certificate" not in blobs):
            raise Bad(prefix, "the leaf says otherwise")
        manifest = self.guard(prefix + "manifest.json", lambda: parse_manifest(raw))
        self.check_cms(prefix, raw, cms, manifest, blobs["certificate"])
        checkpoint = manifest["checkpoint"]
        if manifest["account"] != leaf["actor"] or checkpoint["origin"] != self.origin:
            raise Bad(prefix, "made for something else")
        if checkpoint["size"] > number or merkle_root(self.hashes[:checkpoint["size"]]).hex() != checkpoint["root"] or manifest["time"] > leaf["time"]:
            raise Bad(prefix, "its place in the log")
        for name, expected in manifest["artefacts"].items():
            content = self.files.get(prefix + name, self.files.get("blobs/" + expected))
            if content is None or hashlib.sha256(content).hexdigest() != expected:
                raise Bad(prefix + name, "missing or changed")
        if set(names) - {"manifest.json", "approval.p7s"} - set(manifest["artefacts"]):
            raise Bad(prefix, "unsigned file beside a signature")

    def check_cms(self, prefix, raw, cms, manifest, pinned):
        self.write("manifest.json", raw)
        self.write("approval.p7s", cms)
        at = int(manifest["time"].timestamp())
        code, text = self.openssl("cms", "-verify", "-binary", "-inform", "DER", "-in", "approval.p7s", "-content", "manifest.json",
                                  "-CAfile", "site-ca.pem", "-purpose", "any", "-attime", str(at), "-signer", "signer.pem", "-out", os.devnull)
        if code:
            raise Bad(prefix + "approval.p7s", text)
        self.openssl("x509", "-in", "signer.pem", "-outform", "DER", "-out", "signer.der")
        with open(os.path.join(self.folder, "signer.der"), "rb") as file:
            fingerprint = hashlib.sha256(file.read()).hexdigest()
        if fingerprint != pinned or fingerprint != manifest["certificate"]:
            raise Bad(prefix + "approval.p7s", "another certificate")
        _, text = self.openssl("x509", "-in", "signer.pem", "-noout", "-serial", "-subject", "-nameopt", "multiline,utf8,-esc_msb", "-ext", "keyUsage,extendedKeyUsage,basicConstraints", "-text")
        person = [re.search(rf"^ +{attribute} *= (.*)$", text, re.M) for attribute in ("userId", "commonName")]
        if [m and m.group(1) for m in person] != [manifest["account"], manifest["displayName"]]:
            raise Bad(prefix + "approval.p7s", "another person")
        if not ("1.3.6.1.5.5.7.3.36" in text or "Document Signing" in text) or "Digital Signature, Non Repudiation" not in text or "CA:TRUE" in text or "prime256v1" not in text:
            raise Bad(prefix + "approval.p7s", "a certificate for other uses")
        serial = int(re.search(r"^serial=([0-9A-F]+)$", text, re.M).group(1), 16)
        if self.list_time < manifest["time"].replace(microsecond=0) or any(s == serial and when <= manifest["time"] for s, when in self.revoked):
            raise Bad(prefix + "approval.p7s", "revoked, or the list is too old")
        _, text = self.openssl("cms", "-cmsout", "-print", "-inform", "DER", "-in", "approval.p7s")
        signed = datetime.datetime.strptime(re.sub(r"\s+", " ", re.search(r"UTCTIME:(.*)", text[text.index("signingTime"):]).group(1)), "%b %d %H:%M:%S %Y GMT")
        if signed.replace(tzinfo=datetime.timezone.utc) != manifest["time"].replace(microsecond=0):
            raise Bad(prefix + "approval.p7s", "another time")


# --- The command -----------------------------------------------------------------------------------------------------

def read(path):
    with open(path, "rb") as file:
        return file.read()


def load_trust(folder):
    authorities, keys = [], []
    for name in sorted(os.listdir(folder)):
        content = read(os.path.join(folder, name))
        if name.endswith(".pem"):
            body = re.search(rb"-----BEGIN CERTIFICATE-----(.*?)-----END CERTIFICATE-----", content, re.S)
            authorities.append(hashlib.sha256(base64.b64decode(body.group(1))).hexdigest())
        elif name.endswith(".vkey"):
            keys += [Key(line) for line in content.decode().split("\n") if line.strip()]
        else:
            raise ValueError(name)
    return authorities, keys


def verify(raw, trust, checkpoint):
    try:
        authorities, keys = load_trust(trust) if trust else ([], [])
        outside = None
        if checkpoint:
            note = parse_note(read(checkpoint))
            outside = (note, parse_checkpoint(note[0]))
    except (ValueError, AttributeError) as fault:
        return USAGE, str(fault)
    try:
        return Verifier(raw, authorities, keys, outside).run(), ""
    except Bad as fault:
        return BAD, ": ".join(str(part) for part in fault.args)


def flips(path, trust):
    raw, outcomes = bytearray(read(path)), []
    for i in range(len(raw)):
        raw[i] ^= 1 + i % 255
        outcomes.append(str(verify(bytes(raw), trust, None)[0]))
        raw[i] ^= 1 + i % 255
    return "".join(outcomes)


def cases(folder):
    result = {}
    for name in sorted(os.listdir(folder)):
        path = lambda file: os.path.join(folder, name, file)
        given = lambda file: path(file) if os.path.exists(path(file)) else None
        result[name] = verify(read(path("bundle.zip")), given("trust"), given("checkpoint.txt"))
    return result


def main(arguments):
    option = lambda name: arguments[arguments.index(name) + 1] if name in arguments else None
    if "--cases" in arguments:
        print(json.dumps(cases(option("--cases"))))
        return 0
    if "--flips" in arguments:
        print(flips(option("--flips"), option("--trust")))
        return 0
    if not arguments or arguments[0].startswith("--"):
        print(__doc__)
        return USAGE
    outcome, words = verify(read(arguments[0]), option("--trust"), option("--checkpoint"))
    print(["good", "BAD", "cannot check", "consistent, origin unknown"][outcome], words)
    return outcome


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
