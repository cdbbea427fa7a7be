using System.Collections.Frozen;
using System.Reflection;
using System.Reflection.Emit;

namespace Fusecraft.Tests.Support;

/// <summary>Finds every type that a compiled type refers to: in its declaration, its members' signatures, and the code of its methods.</summary>
public static class TypeReferences
{
    private const BindingFlags Declared = BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly;

    private static readonly FrozenDictionary<short, OpCode> _opCodes = typeof(OpCodes).GetFields(BindingFlags.Public | BindingFlags.Static)
        .Select(field => (OpCode)field.GetValue(null)!)
        .ToFrozenDictionary(opCode => opCode.Value);

    /// <summary>The types referred to, generic ones as their definitions, without the type itself.</summary>
    public static IReadOnlySet<Type> Of(Type type)
    {
        var found = new HashSet<Type>();
        Add(found, type.BaseType);
        AddAll(found, type.GetInterfaces());
        AddConstraints(found, type.GetGenericArguments());
        foreach (var field in type.GetFields(Declared))
        {
            Add(found, field.FieldType);
        }

        foreach (var property in type.GetProperties(Declared))
        {
            Add(found, property.PropertyType);
        }

        foreach (var method in type.GetMethods(Declared).Concat<MethodBase>(type.GetConstructors(Declared)))
        {
            AddSignature(found, method);
            AddBody(found, method);
        }

        found.Remove(type.IsGenericType ? type.GetGenericTypeDefinition() : type);
        return found;
    }

    private static void AddSignature(HashSet<Type> found, MethodBase method)
    {
        AddAll(found, method.GetParameters().Select(parameter => parameter.ParameterType));
        Add(found, (method as MethodInfo)?.ReturnType);
        if (method.IsGenericMethod)
        {
            AddAll(found, method.GetGenericArguments());
            AddConstraints(found, method.GetGenericArguments());
        }
    }

    private static void AddBody(HashSet<Type> found, MethodBase method)
    {
        if (method.GetMethodBody() is not { } body)
        {
            return;
        }

        AddAll(found, body.LocalVariables.Select(local => local.LocalType));
        AddAll(found, body.ExceptionHandlingClauses.Where(clause => clause.Flags == ExceptionHandlingClauseOptions.Clause).Select(clause => clause.CatchType!));
        var typeArguments = method.DeclaringType!.GetGenericArguments();
        var methodArguments = method.IsGenericMethod ? method.GetGenericArguments() : [];
        foreach (var token in MemberTokens(body.GetILAsByteArray()!))
        {
            switch (method.Module.ResolveMember(token, typeArguments, methodArguments))
            {
                case Type type: Add(found, type); break;
                case FieldInfo field: AddAll(found, [field.DeclaringType!, field.FieldType]); break;
                case MethodBase called: Add(found, called.DeclaringType); AddSignature(found, called); break;
            }
        }
    }

    /// <summary>The operands that are members or types. Layout of the code: ECMA-335, partition III.</summary>
    private static IEnumerable<int> MemberTokens(byte[] code)
    {
        for (var at = 0; at < code.Length;)
        {
            var opCode = code[at] == 0xFE ? _opCodes[(short)((0xFE << 8) | code[at + 1])] : _opCodes[code[at]];
            at += opCode.Size;
            if (opCode.OperandType is OperandType.InlineField or OperandType.InlineMethod or OperandType.InlineTok or OperandType.InlineType)
            {
                yield return BitConverter.ToInt32(code, at);
            }

            at += opCode.OperandType switch
            {
                OperandType.InlineNone => 0,
                OperandType.ShortInlineBrTarget or OperandType.ShortInlineI or OperandType.ShortInlineVar => 1,
                OperandType.InlineVar => 2,
                OperandType.InlineI8 or OperandType.InlineR => 8,
                OperandType.InlineSwitch => 4 + (4 * BitConverter.ToInt32(code, at)),
                _ => 4,
            };
        }
    }

    private static void AddConstraints(HashSet<Type> found, Type[] parameters) =>
        AddAll(found, parameters.Where(parameter => parameter.IsGenericParameter).SelectMany(parameter => parameter.GetGenericParameterConstraints()));

    private static void AddAll(HashSet<Type> found, IEnumerable<Type> types)
    {
        foreach (var type in types)
        {
            Add(found, type);
        }
    }

    private static void Add(HashSet<Type> found, Type? type)
    {
        if (type is null || type.IsGenericParameter)
        {
            return;
        }

        if (type.HasElementType)
        {
            Add(found, type.GetElementType());
        }
        else if (found.Add(type.IsGenericType ? type.GetGenericTypeDefinition() : type) || type.IsConstructedGenericType)
        {
            AddAll(found, type.GetGenericArguments());
        }
    }
}
